/** The first letter as a capital: "study 1 finished" → "Study 1 finished". */
export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}
