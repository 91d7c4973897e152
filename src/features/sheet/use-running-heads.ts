import { useEffect } from 'react'
import type { Revision, Setup } from '../../../shared/api/setups.ts'
import { shortHash, type Standing } from '../../revision/standing.ts'
import { standingWord } from './standing-word.ts'

/** Texts at the head and foot of every printed page, while the sheet is open. */
export function useRunningHeads(setup: Setup, revision: Revision, standing: Standing): void {
  const { part } = revision.content
  const head = `${part.number} ${part.name} · rev ${revision.number} · ${standingWord(standing)}`
  const foot = `Undercant set-up sheet · ${setup.name} · ${shortHash(revision.hash)}`
  useEffect(() => {
    const { style } = document.documentElement
    style.setProperty('--sheet-head', cssString(head))
    style.setProperty('--sheet-foot', cssString(foot))
    return () => {
      style.removeProperty('--sheet-head')
      style.removeProperty('--sheet-foot')
    }
  }, [head, foot])
}

/** A text as a CSS string; names may hold quotes, backslashes and line breaks. */
export function cssString(text: string): string {
  return `"${text.replace(/["\\\n\r\f]/g, (sign) => `\\${sign.charCodeAt(0).toString(16)} `)}"`
}
