import pino, { type DestinationStream, type Logger } from 'pino'

/** Names under which a secret could stand, wherever a line has them. */
const secrets = ['password', 'secret', 'authorization', 'cookie', 'key', 'passwordHash', 'hash']

/** Structured log lines; secrets are taken out even where one was put in by mistake. */
export function createLog(level: string, destination?: DestinationStream): Logger {
  const paths = secrets.flatMap((name) => [name, `*.${name}`, `*.*.${name}`])
  return pino(
    { level, base: null, timestamp: pino.stdTimeFunctions.isoTime, redact: { paths, censor: '(secret)' } },
    destination ?? pino.destination(1),
  )
}
