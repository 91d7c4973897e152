/** The package tells the types of its module beside it, not where it is imported from. */
declare module 'clipper2-wasm/dist/es/clipper2z.js' {
  import type { MainModule } from 'clipper2-wasm/dist/clipper2z.d.ts'

  const load: (options: { wasmBinary: Uint8Array }) => Promise<MainModule>
  export default load
}
