import pino from 'pino'

/** Structured lines on standard output; what could be a secret never reaches them. */
export const log = pino({
  name: 'web',
  level: process.env.BAYWRIGHT_LOG_LEVEL ?? 'info',
  redact: ['password', '*.password', 'cookie', '*.cookie', 'headers.cookie', 'password_hash', '*.password_hash'],
})
