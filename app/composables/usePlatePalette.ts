import { TOKENS, type Palette, type Token } from '~/utils/plate/draw/pen'

/** The colours in force, for drawings on a canvas; `changed` is called when the theme changes. */
export function usePlatePalette(changed: () => void) {
  let palette = read()

  function read(): Palette {
    const style = getComputedStyle(document.documentElement)
    return Object.fromEntries(
      TOKENS.map(token => [token, style.getPropertyValue(`--${token}`).trim() || '#000']),
    ) as Record<Token, string>
  }

  function refresh() {
    palette = read()
    changed()
  }

  useMutationObserver(() => document.documentElement, refresh, { attributes: true, attributeFilter: ['data-theme', 'class'] })
  useEventListener(() => window.matchMedia('(prefers-color-scheme: dark)'), 'change', refresh)

  return { current: () => palette }
}
