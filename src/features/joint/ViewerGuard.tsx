import { Component, type ReactNode } from 'react'

/** The 3D part is a help, not the page: when it fails, the numbers stay. */
export class ViewerGuard extends Component<{ readonly children: ReactNode }, { readonly failed: boolean }> {
  override state = { failed: false }

  static getDerivedStateFromError() {
    return { failed: true }
  }

  override render() {
    if (!this.state.failed) return this.props.children
    return <p>The part cannot be shown in 3D here. The section and the numbers above are complete.</p>
  }
}
