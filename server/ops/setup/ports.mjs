/** The port of the web server. */
import { createServer } from 'node:net'
import { SetupError } from './words.mjs'

/** BAYWRIGHT_PORT, else PORT, else 3000. */
export function wantedPort(env = process.env) {
  const text = env.BAYWRIGHT_PORT ?? env.PORT ?? '3000'
  const port = Number(text)
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new SetupError(`the port "${text}" is not a whole number from 1 to 65535; set PORT to one, for example PORT=3001 npm start.`)
  }
  return port
}

/** Throws a SetupError when the port of loopback cannot be listened on. */
export async function demandPort(port) {
  const code = await new Promise((done) => {
    const server = createServer()
    server.once('error', error => done(error.code))
    server.listen(port, '127.0.0.1', () => server.close(() => done(undefined)))
  })
  if (code === 'EADDRINUSE') {
    throw new SetupError(`port ${port} is taken by another program; stop that program, or choose another port, for example PORT=${port < 65_000 ? port + 1 : 3001} npm start.`)
  }
  if (code === 'EACCES') {
    throw new SetupError(`this account may not listen on port ${port}; choose one above 1023, for example PORT=3000 npm start.`)
  }
  if (code) throw new SetupError(`port ${port} cannot be used (${code}); choose another, for example PORT=3001 npm start.`)
}
