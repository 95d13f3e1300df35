export type Theme = 'system' | 'light' | 'dark'

export const THEMES: readonly { value: Theme, label: string }[] = [
  { value: 'system', label: 'As the system' },
  { value: 'light', label: 'Light' },
  { value: 'dark', label: 'Dark' },
]

/** The chosen theme, kept in a cookie so that the first page already comes in it. */
export function useTheme() {
  const cookie = useCookie<Theme>('theme', { default: () => 'system', maxAge: 365 * 24 * 3600, sameSite: 'lax', path: '/' })
  const theme = computed<Theme>(() => cookie.value === 'light' || cookie.value === 'dark' ? cookie.value : 'system')
  function setTheme(value: Theme) {
    cookie.value = value
    if (import.meta.client) applyTheme(value)
  }
  return { theme, setTheme }
}

function applyTheme(value: Theme) {
  if (value === 'system') document.documentElement.removeAttribute('data-theme')
  else document.documentElement.setAttribute('data-theme', value)
}

export const TOKEN_NAMES = [
  'paper', 'sheet', 'ink', 'ink2', 'ink3', 'oxide', 'on-oxide', 'galv', 'edge', 'line', 'ghost', 'selected', 'governs',
] as const
export type Tokens = Record<typeof TOKEN_NAMES[number], string>

/**
 * The colours in force as plain values, for a canvas that cannot read CSS variables; they follow the
 * switch and the system. Browser only: on the server every value is empty.
 */
export function useTokens() {
  const tokens = shallowRef<Tokens>(Object.fromEntries(TOKEN_NAMES.map(name => [name, ''])) as Tokens)
  const { theme } = useTheme()
  const prefersDark = usePreferredDark()
  function read() {
    const style = getComputedStyle(document.documentElement)
    tokens.value = Object.fromEntries(TOKEN_NAMES.map(name => [name, style.getPropertyValue(`--${name}`).trim()])) as Tokens
  }
  if (import.meta.client) {
    watch([theme, prefersDark], () => nextTick(read))
    if (getCurrentInstance()) onBeforeMount(read)
    else read()
  }
  return tokens
}
