/** Once a run of the api suite: starts its MariaDB and names it in TEST_DATABASE_URL; stops it at the end. */
import { startTestServer } from './mariadb-server.ts'

export default async function setup(): Promise<() => Promise<void>> {
  const server = await startTestServer()
  process.env.TEST_DATABASE_URL = server.url
  return () => server.stop()
}
