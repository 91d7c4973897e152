import { createServer, connect, type Socket } from 'node:net'

export interface Proxy {
  readonly port: number
  /** Bytes stop flowing both ways; connections stay. */
  readonly pause: () => void
  readonly resume: () => void
  /** Every connection is cut, and new ones are refused until `open`. */
  readonly cut: () => void
  readonly open: () => void
  readonly close: () => Promise<void>
}

/** A way to a database that can be stopped, continued and cut, without touching the database itself. */
export async function startProxy(targetPort: number): Promise<Proxy> {
  const sockets = new Set<Socket>()
  let paused = false
  let refused = false
  const server = createServer((inward) => {
    if (refused) {
      inward.destroy()
      return
    }
    const outward = connect(targetPort, '127.0.0.1')
    for (const [from, to] of [
      [inward, outward],
      [outward, inward],
    ] as const) {
      sockets.add(from)
      from.on('data', (bytes) => void to.write(bytes))
      from.on('close', () => {
        sockets.delete(from)
        to.destroy()
      })
      from.on('error', () => undefined)
      if (paused) from.pause()
    }
  })
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const { port } = server.address() as { port: number }
  return {
    port,
    pause: () => {
      paused = true
      for (const socket of sockets) socket.pause()
    },
    resume: () => {
      paused = false
      for (const socket of sockets) socket.resume()
    },
    cut: () => {
      refused = true
      for (const socket of sockets) socket.destroy()
    },
    open: () => {
      refused = false
    },
    close: async () => {
      for (const socket of sockets) socket.destroy()
      await new Promise<void>((resolve) => server.close(() => resolve()))
    },
  }
}
