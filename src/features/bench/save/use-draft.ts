import { useEffect, useState } from 'react'
import { useCurrentUser } from '../../../app/current-user.tsx'
import { sameContent } from '../model/content.ts'
import { DRAFT_WITHIN_MS, dropDraft, findDraft, keepDraft, type Draft } from '../model/draft.ts'
import { useBench, useBenchApi, useContent } from '../model/store.ts'
import { useScene } from '../scene.ts'

/** Half of what is promised, so that a slow page still keeps its promise. */
const WAIT_MS = DRAFT_WITHIN_MS / 2

/** Keeps what is typed in the browser, and gives back what an earlier visit left there. */
export function useDraft(): { found: Draft | null; goOn: () => void; discard: () => void } {
  const { setup, readOnly } = useScene()
  const { id: person } = useCurrentUser()
  const content = useContent()
  const base = useBench((state) => state.base)
  const api = useBenchApi()
  const acts = api.getState().do
  const setupId = setup.id

  const [found, setFound] = useState(() => {
    const draft = readOnly ? null : findDraft(localStorage, setupId, person)
    return draft !== null && !sameContent(draft.content, base.content) ? draft : null
  })

  const waitsForAnswer = found !== null
  useEffect(() => {
    if (readOnly || waitsForAnswer) return
    if (sameContent(content, base.content)) {
      dropDraft(localStorage, setupId, person)
      acts.drafted({ keptAt: null, failed: false })
      return
    }
    const keep = () => {
      const { revision, version } = base
      const keptAt = Date.now()
      const kept = keepDraft(localStorage, { setupId, person, revision, version, keptAt, content })
      acts.drafted({ keptAt: kept ? keptAt : null, failed: !kept })
    }
    const timer = setTimeout(keep, WAIT_MS)
    // A page that is put away may never run again: keep it now.
    const hidden = () => {
      if (document.visibilityState === 'hidden') keep()
    }
    document.addEventListener('visibilitychange', hidden)
    return () => {
      clearTimeout(timer)
      document.removeEventListener('visibilitychange', hidden)
    }
  }, [content, base, readOnly, waitsForAnswer, setupId, person, acts])

  return {
    found,
    goOn: () => {
      if (found !== null) acts.continueDraft(found.content, found.version)
      setFound(null)
    },
    discard: () => {
      dropDraft(localStorage, setupId, person)
      setFound(null)
    },
  }
}
