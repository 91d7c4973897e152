/** The promise's outcome, or `late()` as the error when it takes longer than `ms`; the work itself goes on. */
export async function within<T>(ms: number, promise: Promise<T>, late: () => Error): Promise<T> {
  let timer: NodeJS.Timeout | undefined
  const deadline = new Promise<never>((_, reject) => {
    timer = setTimeout(() => reject(late()), ms)
  })
  try {
    return await Promise.race([promise, deadline])
  } finally {
    clearTimeout(timer)
  }
}

/** Whether the promise is settled, either way, before `ms` have passed. */
export async function settlesWithin(ms: number, promise: Promise<unknown>): Promise<boolean> {
  let timer: NodeJS.Timeout | undefined
  const late = new Promise<false>((resolve) => {
    timer = setTimeout(() => resolve(false), ms)
  })
  const settled = promise.then(
    () => true,
    () => true,
  )
  try {
    return await Promise.race([settled, late])
  } finally {
    clearTimeout(timer)
  }
}
