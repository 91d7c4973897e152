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
