import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import type { Setup } from '../../../../shared/api/setups.ts'
import { call } from '../../../api/client.ts'
import { isCode } from '../../../api/errors.ts'
import { saveSetupMutation, setupQuery } from '../../../api/setups.ts'
import { announce } from '../../../ui/announce.ts'
import { sameContent } from '../model/content.ts'
import { useBench, useBenchApi, useContent } from '../model/store.ts'
import { useScene } from '../scene.ts'

export interface Saving {
  /** Resolves to the saved set-up, or null when it was not saved. */
  readonly save: () => Promise<Setup | null>
  readonly saving: boolean
  readonly dirty: boolean
  /** Why saving is not possible now; null when it is. */
  readonly blocked: string | null
  readonly error: unknown
  /** The newest of the other side when somebody saved in between. */
  readonly conflict: Setup | null
  readonly resolve: (choice: 'mine' | 'theirs' | 'later') => void
}

/** Saves on top of the version that the bench knows; when somebody was quicker, both sides are shown. */
export function useSave(): Saving {
  const { setup, readOnly } = useScene()
  const client = useQueryClient()
  const mutation = useMutation(saveSetupMutation(client))
  const api = useBenchApi()
  const content = useContent()
  const base = useBench((state) => state.base)
  const unclear = useBench((state) => state.unclear)
  const [conflict, setConflict] = useState<Setup | null>(null)

  const blocked = readOnly
    ? 'This revision is read-only.'
    : unclear.size > 0
      ? 'A number is not understood yet. Put it right, then save.'
      : null

  async function save(): Promise<Setup | null> {
    const state = api.getState()
    const sent = state.history.present
    if (readOnly || state.unclear.size > 0 || mutation.isPending) return null
    try {
      const answer = await mutation.mutateAsync({ id: setup.id, body: sent, ifMatch: state.base.version })
      state.do.saved(answer, sent)
      announce(`Saved as revision ${answer.revision.number}`)
      return answer
    } catch (error) {
      if (isCode(error, 'version-stale')) {
        setConflict(await call('getSetup', { params: { id: setup.id } }))
        mutation.reset()
      }
      return null
    }
  }

  function resolve(choice: 'mine' | 'theirs' | 'later') {
    const theirs = conflict
    setConflict(null)
    if (theirs === null || choice === 'later') return
    client.setQueryData(setupQuery(theirs.id).queryKey, theirs)
    if (choice === 'theirs') {
      api.getState().do.takeTheirs(theirs)
      announce(`Revision ${theirs.revision.number} is on the bench. Undo brings your own back.`)
    } else {
      api.getState().do.keepMine(theirs)
      void save()
    }
  }

  return {
    save,
    saving: mutation.isPending,
    dirty: !sameContent(content, base.content),
    blocked,
    error: mutation.error,
    conflict,
    resolve,
  }
}
