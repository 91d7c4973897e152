import net from 'node:net'
import { StartError } from './say.mjs'

/** @param {number} port @returns {Promise<boolean>} */
export function isFree(port) {
  return new Promise((resolve) => {
    const probe = net.createServer()
    probe.once('error', () => resolve(false))
    probe.listen({ port, host: '127.0.0.1', exclusive: true }, () => probe.close(() => resolve(true)))
  })
}

/**
 * The first free loopback port of a run of them (below the range that systems hand out by themselves).
 * @param {number} from
 * @param {number} count
 */
export async function freePort(from, count = 200) {
  for (let port = from; port < from + count; port += 1) if (await isFree(port)) return port
  throw new StartError(`No free port between ${from} and ${from + count - 1}.`)
}
