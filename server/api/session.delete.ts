/** Signs out; whoever is signed out already is answered alike. */
export default apiHandler(async (event) => {
  await clearUserSession(event)
  setResponseStatus(event, 204)
  return null
})
