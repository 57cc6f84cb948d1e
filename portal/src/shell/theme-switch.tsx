import { useTheme } from './theme.ts'

export function ThemeSwitch() {
  const [theme, choose] = useTheme()
  const other = theme === 'dark' ? 'light' : 'dark'
  return (
    <button type="button" className="tool" aria-label={`Switch to ${other}`} onClick={() => choose(other)}>
      {other === 'dark' ? 'Dark' : 'Light'}
    </button>
  )
}
