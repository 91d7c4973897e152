import { useQuery } from '@tanstack/react-query'
import { useEffect, useRef, useState } from 'react'
import { draftQuery, dropDraftOnServer, keepDraftOnServer } from '../../../api/drafts.ts'
import { useCurrentUser } from '../../../app/current-user.tsx'
import { sameContent } from '../model/content.ts'
import { DRAFT_WITHIN_MS, dropDraft, findDraft, keepDraft, type Draft } from '../model/draft.ts'
import { useBench, useBenchApi, useContent } from '../model/store.ts'
import { useScene } from '../scene.ts'

/** Half of what is promised, so that a slow page still keeps its promise. */
const WAIT_MS = DRAFT_WITHIN_MS / 2

/** What an earlier visit left, and where it was found. */
export interface FoundDraft extends Draft {
  readonly place: 'browser' | 'server'
}

/**
 * Keeps what is typed in the browser and on the server, and gives back what an earlier visit left in either:
 * the later of both, as a crash of the browser takes the one and a lost connection the other.
 */
export function useDraft(): { found: FoundDraft | null; goOn: () => void; discard: () => void } {
  const { setup, readOnly } = useScene()
  const { id: person } = useCurrentUser()
  const content = useContent()
  const base = useBench((state) => state.base)
  const api = useBenchApi()
  const acts = api.getState().do
  const setupId = setup.id
  const onServer = useServerDraft(setupId, person, readOnly)
  const hasOnServer = useRef(false)

  const [inBrowser] = useState(() => (readOnly ? null : findDraft(localStorage, setupId, person)))
  const [answered, setAnswered] = useState(false)
  const [began] = useState(base.content)
  const later = laterOf(inBrowser, onServer)
  // Once the person has begun anew, an old draft is no longer in question.
  const found =
    answered || later === null || content !== began || sameContent(later.content, base.content) ? null : later

  const waitsForAnswer = found !== null
  useEffect(() => {
    if (readOnly || waitsForAnswer) return
    if (sameContent(content, base.content)) {
      dropDraft(localStorage, setupId, person)
      if (hasOnServer.current || onServer !== null) void dropDraftOnServer(setupId).catch(() => undefined)
      hasOnServer.current = false
      acts.drafted({ keptAt: null, failed: false })
      return
    }
    const sending = new AbortController()
    const { revision, version } = base
    const keep = () => {
      const keptAt = Date.now()
      const kept = keepDraft(localStorage, { setupId, person, revision, version, keptAt, content })
      acts.drafted({ keptAt: kept ? keptAt : null, failed: !kept })
      keepDraftOnServer(setupId, { revision, version, content }, sending.signal).then(
        () => {
          hasOnServer.current = true
          if (!sending.signal.aborted) acts.drafted({ keptAt, failed: false })
        },
        // The browser has it; the next keystroke tries the server again.
        () => undefined,
      )
    }
    const timer = setTimeout(keep, WAIT_MS)
    // A page that is put away may never run again: keep it now.
    const hidden = () => {
      if (document.visibilityState === 'hidden') keep()
    }
    document.addEventListener('visibilitychange', hidden)
    return () => {
      clearTimeout(timer)
      sending.abort()
      document.removeEventListener('visibilitychange', hidden)
    }
  }, [content, base, readOnly, waitsForAnswer, setupId, person, onServer, acts])

  return {
    found,
    goOn: () => {
      if (found !== null) acts.continueDraft(found.content, found.version)
      setAnswered(true)
    },
    discard: () => {
      dropDraft(localStorage, setupId, person)
      void dropDraftOnServer(setupId).catch(() => undefined)
      setAnswered(true)
    },
  }
}

/** What the server kept, asked for once. */
function useServerDraft(setupId: string, person: string, readOnly: boolean): Draft | null {
  const { data } = useQuery({ ...draftQuery(setupId), enabled: !readOnly })
  const draft = data?.draft
  const [kept, setKept] = useState<Draft | null>(null)
  if (draft && kept === null) {
    const { revision, version, content } = draft
    setKept({ setupId, person, revision, version, keptAt: Date.parse(draft.keptAt), content })
  }
  return kept
}

function laterOf(inBrowser: Draft | null, onServer: Draft | null): FoundDraft | null {
  if (inBrowser && (!onServer || inBrowser.keptAt >= onServer.keptAt - DRAFT_WITHIN_MS)) {
    return { ...inBrowser, place: 'browser' }
  }
  return onServer && { ...onServer, place: 'server' }
}
