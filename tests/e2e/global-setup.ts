/** Once a run of the browser suite: a whole shop with the demo, in a data folder of its own; FELLOE_URL and FELLOE_MAIL_URL name it. */
import { freePorts, launchShop, removeFolder, stopShop, temporaryFolder } from '../support/shop.ts'

export default async function setup(): Promise<() => Promise<void>> {
  const dataDir = temporaryFolder()
  const ports = await freePorts()
  const launch = launchShop({ ...ports, DATA_DIR: dataDir })
  try {
    process.env.FELLOE_URL = await launch.ready
  } catch (error) {
    removeFolder(dataDir)
    throw error
  }
  process.env.FELLOE_MAIL_URL = `http://127.0.0.1:${ports.MAIL_SINK_PORT}`
  process.env.FELLOE_PAY_URL = `http://127.0.0.1:${ports.STRIPE_FAKE_PORT}`
  return async () => {
    await stopShop(launch)
    removeFolder(dataDir)
  }
}
