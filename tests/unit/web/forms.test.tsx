// @vitest-environment jsdom
import { cleanup, fireEvent, screen, waitFor } from '@testing-library/react'
import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest'
import type { Part } from '../../../shared/api/parts.ts'
import { RenameDialog } from '../../../src/features/parts/RenameDialog.tsx'
import SignInForm from '../../../src/features/sign-in/SignInForm.tsx'
import { refused, renderPiece, serveApi, teachDialogs } from './render.tsx'

const id = '0b0e7a52-6a0f-4d39-9a53-4a3f2f3c1d11'
const ana = { id, name: 'Ana' }

beforeAll(teachDialogs)
afterEach(() => {
  cleanup()
  vi.unstubAllGlobals()
})

const about = (demo: boolean) => ({
  name: 'Undercant',
  demo,
  demoAccounts: demo ? [{ email: 'welder@saltmarsh.example', role: 'welder' }] : [],
})
const fill = (label: string, value: string) =>
  fireEvent.change(screen.getByLabelText(label), { target: { value } })
const valueOf = (label: string) => screen.getByLabelText<HTMLInputElement>(label).value

describe('signing in', () => {
  it('fills a demo account in with one press and signs in', async () => {
    const user = { id, email: 'welder@saltmarsh.example', name: 'Ana', role: 'welder' }
    const asked = serveApi({
      'GET /api/about': () => ({ body: about(true) }),
      'POST /api/session': () => ({ body: { user } }),
    })
    const onSignedIn = vi.fn()
    renderPiece(<SignInForm onSignedIn={onSignedIn} />)
    fireEvent.click(await screen.findByRole('button', { name: 'welder' }))
    fireEvent.click(screen.getByRole('button', { name: 'Sign in' }))
    await waitFor(() => expect(onSignedIn).toHaveBeenCalledWith(user))
    expect(asked.at(-1)?.body).toEqual({ email: 'welder@saltmarsh.example', password: 'tidal-footbridge' })
  })

  it('offers no accounts outside the demo', async () => {
    serveApi({ 'GET /api/about': () => ({ body: about(false) }) })
    const { client } = renderPiece(<SignInForm onSignedIn={vi.fn()} />)
    await waitFor(() => expect(client.getQueryData(['about'])).toBeDefined())
    expect(screen.queryByText('Demo accounts')).toBeNull()
  })

  it('keeps what was typed when it is wrong, and says what to do', async () => {
    serveApi({
      'GET /api/about': () => ({ body: about(false) }),
      'POST /api/session': () => refused(401, 'wrong-sign-in'),
    })
    const onSignedIn = vi.fn()
    renderPiece(<SignInForm onSignedIn={onSignedIn} />)
    fill('Email', 'ana@shop.example')
    fill('Password', 'not this one')
    fireEvent.click(screen.getByRole('button', { name: 'Sign in' }))
    expect((await screen.findByRole('alert')).textContent).toContain('do not belong together')
    expect(valueOf('Email')).toBe('ana@shop.example')
    expect(valueOf('Password')).toBe('not this one')
    expect(onSignedIn).not.toHaveBeenCalled()
  })

  it('passes the wait on when there were too many attempts', async () => {
    serveApi({
      'GET /api/about': () => ({ body: about(false) }),
      'POST /api/session': () => refused(429, 'too-many-attempts', 'Wait 14 minutes.'),
    })
    renderPiece(<SignInForm onSignedIn={vi.fn()} />)
    fill('Email', 'ana@shop.example')
    fill('Password', 'x')
    fireEvent.click(screen.getByRole('button', { name: 'Sign in' }))
    expect((await screen.findByRole('alert')).textContent).toContain('Wait 14 minutes.')
  })

  it('asks nothing of the server while a field is empty', async () => {
    const asked = serveApi({ 'GET /api/about': () => ({ body: about(false) }) })
    renderPiece(<SignInForm onSignedIn={vi.fn()} />)
    fireEvent.click(screen.getByRole('button', { name: 'Sign in' }))
    expect(await screen.findAllByRole('alert')).toHaveLength(2)
    expect(asked.map(({ what }) => what)).toEqual(['GET /api/about'])
  })
})

describe('renaming a part while someone else does', () => {
  const part: Part = {
    id,
    number: 'BP-04',
    name: 'Bearing plate',
    drawing: {
      id,
      fileName: 'a.dxf',
      size: 1,
      sha256: 'ab',
      uploadedBy: ana,
      uploadedAt: '2026-01-01T00:00:00Z',
    },
    reading: { joinTolerance: 0.01, recogniseArcs: true, arcTolerance: 0.01 },
    loops: [],
    area: 1,
    bounds: { minX: 0, minY: 0, maxX: 1, maxY: 1 },
    createdBy: ana,
    createdAt: '2026-01-01T00:00:00Z',
    version: 4,
  }
  const theirs = { ...part, name: 'Bearing plate, east', version: 5 }
  const table = () =>
    serveApi({
      [`PATCH /api/parts/${id}`]: (_, headers) =>
        headers.get('if-match') === '"5"'
          ? { body: { ...theirs, name: 'Mine', version: 6 } }
          : refused(412, 'version-stale'),
      [`GET /api/parts/${id}`]: () => ({ body: theirs }),
    })

  async function conflict(onClose = vi.fn()) {
    const asked = table()
    renderPiece(<RenameDialog part={part} onClose={onClose} />)
    fill('Name', 'Mine')
    fireEvent.click(screen.getByRole('button', { name: 'Save' }))
    const alert = await screen.findByRole('alert')
    return { asked, alert, onClose }
  }

  it('shows both and keeps what was typed', async () => {
    const { alert, onClose } = await conflict()
    expect(alert.textContent).toContain('BP-04 Bearing plate, east')
    expect(alert.textContent).toContain('BP-04 Mine')
    expect(valueOf('Name')).toBe('Mine')
    expect(onClose).not.toHaveBeenCalled()
  })

  it('saves over it only when told to, with the version that was shown', async () => {
    const { asked, onClose } = await conflict()
    fireEvent.click(screen.getByRole('button', { name: 'Save mine over it' }))
    await waitFor(() => expect(onClose).toHaveBeenCalled())
    expect(
      asked.filter(({ what }) => what.startsWith('PATCH')).map(({ headers }) => headers.get('if-match')),
    ).toEqual(['"4"', '"5"'])
  })

  it('leaves theirs when told to', async () => {
    const { asked, onClose } = await conflict()
    fireEvent.click(screen.getByRole('button', { name: 'Keep what is saved' }))
    expect(onClose).toHaveBeenCalled()
    expect(asked.filter(({ what }) => what.startsWith('PATCH'))).toHaveLength(1)
  })
})
