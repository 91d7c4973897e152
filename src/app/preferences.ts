import { useSyncExternalStore } from 'react'
import { create } from 'zustand'
import type { DisplayUnit } from '../../shared/units/length.ts'
import type { Theme } from '../theme/tilt-colour.ts'

export type ThemeChoice = Theme | 'system'

export interface Preferences {
  readonly unit: DisplayUnit
  readonly theme: ThemeChoice
}

const STORAGE_KEY = 'undercant.preferences'
const DARK = '(prefers-color-scheme: dark)'
const initial: Preferences = { unit: 'mm', theme: 'system' }

/** Reads stored preferences; anything unknown in them falls back to the first choice. */
export function parsePreferences(text: string | null): Preferences {
  let value: unknown
  try {
    value = text === null ? null : JSON.parse(text)
  } catch {
    return initial
  }
  if (typeof value !== 'object' || value === null) return initial
  const { unit, theme } = value as Partial<Record<keyof Preferences, unknown>>
  return {
    unit: unit === 'in' ? 'in' : 'mm',
    theme: theme === 'paper' || theme === 'tank' ? theme : 'system',
  }
}

function stored(): string | null {
  try {
    return localStorage.getItem(STORAGE_KEY)
  } catch {
    return null
  }
}

export const usePreferences = create<Preferences>(() => parsePreferences(stored()))

/** Changes a preference, here and for the next visit. A browser that stores nothing keeps it for this one. */
export function setPreferences(change: Partial<Preferences>): void {
  usePreferences.setState(change)
  try {
    localStorage.setItem(STORAGE_KEY, JSON.stringify(usePreferences.getState()))
  } catch {
    return
  }
}

export const useUnit = (): DisplayUnit => usePreferences((state) => state.unit)

function subscribeToSystem(changed: () => void): () => void {
  const query = matchMedia(DARK)
  query.addEventListener('change', changed)
  return () => query.removeEventListener('change', changed)
}

const systemTheme = (): Theme => (matchMedia(DARK).matches ? 'tank' : 'paper')

/** The theme that is shown, the system's choice resolved. */
export function useTheme(): Theme {
  const choice = usePreferences((state) => state.theme)
  const system = useSyncExternalStore(subscribeToSystem, systemTheme)
  return choice === 'system' ? system : choice
}

/** Sets `data-theme` on the page and keeps it right; called once, before the first paint. */
export function applyTheme(): void {
  const apply = () => {
    const { theme } = usePreferences.getState()
    document.documentElement.dataset.theme = theme === 'system' ? systemTheme() : theme
  }
  apply()
  usePreferences.subscribe(apply)
  subscribeToSystem(apply)
}
