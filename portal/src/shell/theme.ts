import { useSyncExternalStore } from 'react'

export type Theme = 'light' | 'dark'

const system = () => matchMedia('(prefers-color-scheme: dark)')

function current(): Theme {
  const chosen = document.documentElement.dataset['theme']
  if (chosen === 'light' || chosen === 'dark') return chosen
  return system().matches ? 'dark' : 'light'
}

const listeners = new Set<() => void>()

function subscribe(changed: () => void) {
  const media = system()
  listeners.add(changed)
  media.addEventListener('change', changed)
  return () => {
    listeners.delete(changed)
    media.removeEventListener('change', changed)
  }
}

/** Kept for the next visit; index.html reads it before the first paint. */
function choose(theme: Theme) {
  document.documentElement.dataset['theme'] = theme
  try {
    localStorage.setItem('theme', theme)
  } catch {
    // A browser without storage keeps the choice until the page is left.
  }
  listeners.forEach((changed) => changed())
}

export function useTheme(): readonly [Theme, (theme: Theme) => void] {
  return [useSyncExternalStore(subscribe, current), choose]
}
