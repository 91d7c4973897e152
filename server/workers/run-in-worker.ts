import { createRequire } from 'node:module'
import { pathToFileURL } from 'node:url'
import { Worker } from 'node:worker_threads'

/** What a worker posts back: one message, then it ends. */
export type WorkerAnswer<T, F> = { readonly value: T } | { readonly failure: F }

export interface Bounds {
  /** ms */
  readonly deadline: number
  readonly memoryMb: number
}

export type WorkerOutcome<T, F> = WorkerAnswer<T, F> | { readonly broken: 'late' | 'out-of-memory' }

/**
 * Runs one job in a thread of its own, which is ended whatever it is doing once the deadline has passed.
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
      timer = setTimeout(() => resolve({ broken: 'late' }), deadline)
      worker.once('message', resolve)
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
