// @vitest-environment jsdom
import { act, renderHook } from '@testing-library/react'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import {
  applyTheme,
  parsePreferences,
  setPreferences,
  useTheme,
  useUnit,
} from '../../../src/app/preferences.ts'

let dark = false
const listeners = new Set<() => void>()

beforeEach(() => {
  dark = false
  vi.stubGlobal('matchMedia', () => ({
    get matches() {
      return dark
    },
    addEventListener: (_: string, listener: () => void) => listeners.add(listener),
    removeEventListener: (_: string, listener: () => void) => listeners.delete(listener),
  }))
  localStorage.clear()
  setPreferences({ unit: 'mm', theme: 'system' })
})

describe('stored preferences', () => {
  it.each([null, '', 'not json', '[]', '7', '{"unit":"furlong","theme":"pink"}', '{"unit":null}'])(
    'fall back to mm and the system for %s',
    (text) => expect(parsePreferences(text)).toEqual({ unit: 'mm', theme: 'system' }),
  )

  it('are read back as they were chosen', () => {
    setPreferences({ unit: 'in' })
    setPreferences({ theme: 'tank' })
    expect(parsePreferences(localStorage.getItem('undercant.preferences'))).toEqual({
      unit: 'in',
      theme: 'tank',
    })
  })
})

it('changes the unit where it is used', () => {
  const { result } = renderHook(() => useUnit())
  expect(result.current).toBe('mm')
  act(() => setPreferences({ unit: 'in' }))
  expect(result.current).toBe('in')
})

describe('the theme', () => {
  it('follows the system until a choice is made', () => {
    const { result } = renderHook(() => useTheme())
    expect(result.current).toBe('paper')
    act(() => {
      dark = true
      for (const listener of listeners) listener()
    })
    expect(result.current).toBe('tank')
    act(() => setPreferences({ theme: 'paper' }))
    expect(result.current).toBe('paper')
  })

  it('stands on the page for the tokens', () => {
    applyTheme()
    expect(document.documentElement.dataset.theme).toBe('paper')
    setPreferences({ theme: 'tank' })
    expect(document.documentElement.dataset.theme).toBe('tank')
  })
})
