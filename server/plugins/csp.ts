import { randomBytes } from 'node:crypto'

/**
 * Content security policy of the pages: scripts and style elements run only with the nonce of their answer.
 * Style attributes stay allowed, since positions on a drawing are rendered on the server.
 */
function policy(nonce: string): string {
  return [
    `default-src 'self'`,
    `script-src 'self' 'nonce-${nonce}'`,
    `style-src 'self' 'nonce-${nonce}'`,
    `style-src-attr 'unsafe-inline'`,
    `img-src 'self' data: blob:`,
    `font-src 'self'`,
    `connect-src 'self'`,
    `worker-src 'self' blob:`,
    `object-src 'none'`,
    `base-uri 'none'`,
    `form-action 'self'`,
    `frame-ancestors 'none'`,
  ].join('; ')
}

/** Marks what Nuxt itself writes into the head and behind the page; the page's own markup is left alone. */
function withNonce(chunks: string[], nonce: string): string[] {
  return chunks.map(chunk => chunk.replace(/<(script|style|link)(?=[\s>])/g, `<$1 nonce="${nonce}"`))
}

export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('render:response', (response) => {
    if (response.headers) delete response.headers['x-powered-by']
  })
  // The development server injects scripts and styles of its own.
  if (import.meta.dev) return
  nitro.hooks.hook('render:html', (html, { event }) => {
    const nonce = randomBytes(18).toString('base64')
    html.head = withNonce(html.head, nonce)
    html.bodyAppend = withNonce(html.bodyAppend, nonce)
    setResponseHeader(event, 'content-security-policy', policy(nonce))
  })
})
