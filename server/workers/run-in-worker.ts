import { createRequire } from 'node:module'
import { pathToFileURL } from 'node:url'
import { Worker } from 'node:worker_threads'

/** What a worker posts first, once it is loaded and its work begins: from then on the deadline runs. */
export const STARTED = 'started'

/** How long a thread may take to load its modules on a busy machine, ms. */
const LOADING_PATIENCE = 60_000

/** What a worker posts last; then it ends. */
export type WorkerAnswer<T, F> = { readonly value: T } | { readonly failure: F }

export interface Bounds {
  /** ms */
  readonly deadline: number
  readonly memoryMb: number
}

export type WorkerOutcome<T, F> = WorkerAnswer<T, F> | { readonly broken: 'late' | 'out-of-memory' }

/**
 * Runs one job in a thread of its own, which is ended whatever it is doing once the deadline has passed. The
 * deadline is for the work, not for loading the thread's modules.
 * A crash of the thread rejects.
 */
export async function runInWorker<T, F>(
  file: URL,
  data: unknown,
  { deadline, memoryMb }: Bounds,
): Promise<WorkerOutcome<T, F>> {
  const options = { workerData: data, resourceLimits: { maxOldGenerationSizeMb: memoryMb }, execArgv: [] }
  const worker = file.pathname.endsWith('.ts')
    ? new Worker(loadingSource(file), { ...options, eval: true })
    : new Worker(file, options)
  let timer: NodeJS.Timeout | undefined
  try {
    return await new Promise((resolve, reject) => {
      const late = () => resolve({ broken: 'late' })
      timer = setTimeout(late, LOADING_PATIENCE)
      worker.on('message', (message: WorkerAnswer<T, F> | typeof STARTED) => {
        if (message !== STARTED) {
          resolve(message)
          return
        }
        clearTimeout(timer)
        timer = setTimeout(late, deadline)
      })
      worker.once('error', (error: Error & { code?: string }) => {
        if (error.code === 'ERR_WORKER_OUT_OF_MEMORY') resolve({ broken: 'out-of-memory' })
        else reject(error)
      })
      worker.once('exit', (code) => reject(new Error(`The worker ended without an answer (${code})`)))
    })
  } finally {
    clearTimeout(timer)
    await worker.terminate()
  }
}

/**
 * In development the sources run as they are. Flags that load TypeScript do not reach a thread's own first
 * module in Node 20, so a line of plain script registers the loader and then imports the file.
 */
function loadingSource(file: URL): string {
  const loader = pathToFileURL(
    createRequire(import.meta.url)
      .resolve('tsx/esm/api')
      .replace(/\.cjs$/, '.mjs'),
  )
  const [api, job] = [loader.href, file.href].map((address) => JSON.stringify(address))
  return `import(${api}).then(({ register }) => { register(); return import(${job}) })`
}

/** The worker file beside a module: compiled beside compiled, source beside source. */
export function workerFile(name: string, besides: string): URL {
  return new URL(`./${name}${besides.endsWith('.ts') ? '.ts' : '.js'}`, besides)
}
