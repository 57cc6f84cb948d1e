import { type Config, parseConfig } from './config.ts'
import { createLog } from './log.ts'
import { startService } from './service.ts'

function read(): Config {
  try {
    return parseConfig(process.env)
  } catch (error) {
    console.error((error as Error).message)
    process.exit(1)
  }
}

const config = read()
const log = createLog(config.logLevel)
const service = await startService(config, log).catch((error: Error & { code?: string }) => {
  const reason =
    error.code === 'EADDRINUSE' ? `port ${config.port} of ${config.host} is in use; set PORT to another` : error.message
  console.error(`The service cannot start: ${reason}.`)
  process.exit(1)
})
console.log(`Soakstone listens on http://${config.host}:${service.port}`)

let ending = false
for (const signal of ['SIGINT', 'SIGTERM'] as const)
  process.on(signal, () => {
    if (ending) return
    ending = true
    log.info({ signal }, 'ending')
    service.close().then(
      () => process.exit(0),
      (error: Error) => {
        log.fatal({ error: error.message }, 'the service did not end well')
        process.exit(1)
      },
    )
  })

process.on('unhandledRejection', (error) => {
  log.fatal({ error: String(error) }, 'a rejection was handled nowhere')
  process.exit(1)
})
