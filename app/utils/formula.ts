/**
 * The markup of formulas on calculation sheets: `M_{b,Rd}` and `I_y` are a symbol with a subscript,
 * `10^6` and `m^{2}` a superscript, `λ̄_{LT}` or `bar{λ}_{LT}` a symbol under a bar; `cm⁴` is raised by
 * the page, since no font that is shipped has that figure. A single letter that stands as
 * a word of its own is a symbol and italic; a unit after a number and words are upright.
 */
export interface FormulaPart {
  text: string
  style: 'symbol' | 'upright' | 'sub' | 'sup'
  isBarred: boolean
}

const UNITS = new Set(['m', 'N', 't', 's', 'g'])
const ARTICLES = new Set(['a', 'A', 'I'])
const GREEK = /[\u0370-\u03FF\u1F00-\u1FFF]/u
const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹'
const TOKEN = /bar\{([^}]*)\}|(\p{L})[\u0304\u0305]|([⁰⁴-⁹]+)|([_^])(?:\{([^}]*)\}|([\p{L}\p{N}]))|(\p{L}+)|([^\p{L}_^⁰⁴-⁹]+)|(.)/gu

/** Words after which a single letter is a name: "curve c", "line D". */
const NAMED = /\b(curve|curves|line|lines|class|category|scheme) $/i

function followsNumber(before: string): boolean {
  return /\d[\s\u2009\u202F\u00A0]$/.test(before)
}

function isSymbol(word: string, before: string, after: string): boolean {
  if (GREEK.test(word) || word.length !== 1) return false
  if (/^_/.test(after)) return true
  if (NAMED.test(before)) return false
  // A letter with figures behind it is a name: grade S355, mark P10.
  if (/^\d/.test(after)) return false
  if (UNITS.has(word) && followsNumber(before)) return false
  return !ARTICLES.has(word) || /^\s*[=·×/^)+−-]|^$/.test(after)
}

function merge(parts: FormulaPart[], part: FormulaPart) {
  const last = parts.at(-1)
  if (last?.style === 'upright' && part.style === 'upright' && !last.isBarred && !part.isBarred) last.text += part.text
  else parts.push(part)
}

/** Splits a formula into runs of one style, in order; the text of the runs has no markup left. */
export function parseFormula(markup: string): FormulaPart[] {
  const parts: FormulaPart[] = []
  for (const match of markup.matchAll(TOKEN)) {
    const [whole, braceBarred, letterBarred, raised, mark, braced, single, word, rest, other] = match
    const barred = braceBarred ?? letterBarred
    const before = markup.slice(0, match.index)
    const after = markup.slice(match.index + whole.length)
    if (barred !== undefined) merge(parts, { text: barred, style: GREEK.test(barred) ? 'upright' : 'symbol', isBarred: true })
    else if (raised) merge(parts, { text: [...raised].map(digit => RAISED.indexOf(digit)).join(''), style: 'sup', isBarred: false })
    else if (mark) merge(parts, { text: braced ?? single ?? '', style: mark === '_' ? 'sub' : 'sup', isBarred: false })
    else if (word) merge(parts, { text: word, style: isSymbol(word, before, after) ? 'symbol' : 'upright', isBarred: false })
    else merge(parts, { text: rest ?? other ?? '', style: 'upright', isBarred: false })
  }
  return parts
}

/** The formula read out: subscripts after a space, no markup. */
export function formulaInWords(markup: string): string {
  return parseFormula(markup)
    .map(part => part.isBarred ? `${part.text} bar` : part.style === 'sub' ? ` ${part.text}` : part.style === 'sup' ? ` to the ${part.text}` : part.text)
    .join('')
}

const SUBSCRIPTS = 'cr|LT|Ed|Rd|pl|b|c|f|y|z|n|A|G|Q|M|[0-9]'
const BARE = new RegExp(`(?<![\\p{L}_{])(λ̄|[MVNIWCkχΦφψγαθλ])((?:${SUBSCRIPTS})(?:,(?:${SUBSCRIPTS}))*)(?![\\p{L}\\p{M}])`, 'gu')

/** Symbols written without markup get it: "Mb,Rd" → "M_{b,Rd}", "λ̄LT,0" → "λ̄_{LT,0}". */
export function symbolMarkup(text: string): string {
  return text.replace(BARE, '$1_{$2}')
}
