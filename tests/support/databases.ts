import { createConnection } from 'mysql2/promise'

let made = 0

/**
 * A new empty database on the suite's server.
 * @returns its address, and how to drop it
 */
export async function freshDatabase(label: string): Promise<{ url: string; drop: () => Promise<void> }> {
  const server = process.env.UNDERCANT_TEST_DATABASE
  if (!server)
    throw new Error('UNDERCANT_TEST_DATABASE is not set: run through vitest, whose set-up starts MariaDB')
  made += 1
  const name = `undercant_${label}_${process.pid}_${made}`
  const execute = async (statement: string) => {
    const connection = await createConnection(server)
    try {
      await connection.query(statement)
    } finally {
      await connection.end()
    }
  }
  await execute(`CREATE DATABASE \`${name}\` CHARACTER SET utf8mb4`)
  const url = new URL(server)
  url.pathname = `/${name}`
  return { url: url.toString(), drop: () => execute(`DROP DATABASE IF EXISTS \`${name}\``) }
}
