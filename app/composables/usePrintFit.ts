const MM = 96 / 25.4
/** A4 portrait within margins of 10 mm, less half a millimetre for rounding. */
const PAPER = { width: 190 * MM, height: 276.5 * MM }
/** Type of the rows, pt: the largest that fits one page; what does not fit is set at the largest that reads well and breaks. */
const TYPE = { largest: 8, least: 6.5, step: 0.1, broken: 7 }

function mediaRules(): CSSMediaRule[] {
  const found: CSSMediaRule[] = []
  for (const sheet of document.styleSheets) {
    if (sheet.href && new URL(sheet.href).origin !== location.origin) continue
    for (const rule of sheet.cssRules) if (rule instanceof CSSMediaRule) found.push(rule)
  }
  return found
}

/** Runs `measure` while the page is laid out as on paper; nothing of it is painted. */
function asOnPaper(measure: () => void) {
  const { body } = document
  const scrolled = [...document.querySelectorAll('.print-flow')].map(element => ({ element, top: element.scrollTop, left: element.scrollLeft }))
  const rules = mediaRules().map(({ media }) => ({ media, text: media.mediaText })).filter(({ text }) => /\b(print|screen)\b/.test(text))
  const width = body.style.width
  for (const { media, text } of rules) media.mediaText = text.includes('print') ? 'all' : 'not all'
  body.style.width = `${PAPER.width}px`
  try {
    measure()
  } finally {
    body.style.width = width
    for (const { media, text } of rules) media.mediaText = text
    for (const { element, top, left } of scrolled) element.scrollTo({ top, left, behavior: 'instant' })
  }
}

/** Before a sheet is printed: its rows take the largest type with which all of it stands on one A4 page. */
export function usePrintFit() {
  function fit() {
    const { style, dataset } = document.documentElement
    delete dataset.printBreaks
    const set = (type: number) => style.setProperty('--print-type', type.toFixed(1))
    asOnPaper(() => {
      const steps = Math.round((TYPE.largest - TYPE.least) / TYPE.step)
      for (let step = 0; step <= steps; step++) {
        set(TYPE.largest - step * TYPE.step)
        if (document.body.getBoundingClientRect().height <= PAPER.height) return
      }
      set(TYPE.broken)
      dataset.printBreaks = ''
    })
  }
  useEventListener('beforeprint', fit)
  onUnmounted(() => {
    document.documentElement.style.removeProperty('--print-type')
    delete document.documentElement.dataset.printBreaks
  })
}
