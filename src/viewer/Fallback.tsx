import { Component, type ReactNode } from 'react'

/** Said calmly where the picture would be. */
export function NoPicture({ children }: { children: ReactNode }) {
  return (
    <div
      role="status"
      className="absolute inset-0 grid place-items-center p-6 text-center text-base text-muted"
    >
      <p className="max-w-96">{children}</p>
    </div>
  )
}

export const NO_WEBGL = '3D cannot be shown here; the table and the section have every number.'
export const LOST_WEBGL = 'The 3D picture was interrupted and will come back by itself; nothing is lost.'

interface State {
  readonly failed: boolean
}

/** A renderer that cannot start must not take the page down with it. */
export class PictureBoundary extends Component<{ children: ReactNode }, State> {
  override state: State = { failed: false }

  static getDerivedStateFromError(): State {
    return { failed: true }
  }

  override render() {
    return this.state.failed ? <NoPicture>{NO_WEBGL}</NoPicture> : this.props.children
  }
}
