import { pino } from 'pino'

/** JSON lines on standard output. Requests' bodies and headers never go in: they hold passwords and tokens. */
export const makeLogger = () => pino({ level: process.env.LOG_LEVEL ?? 'info', base: null, timestamp: pino.stdTimeFunctions.isoTime })
