let known: boolean | null = null

/** Whether this browser can draw in 3D at all; asked once. */
export function canDrawInThree(): boolean {
  if (known === null) {
    const context = document.createElement('canvas').getContext('webgl2')
    known = context !== null
    // Browsers allow few contexts at a time; the trial one is given back at once.
    context?.getExtension('WEBGL_lose_context')?.loseContext()
  }
  return known
}
