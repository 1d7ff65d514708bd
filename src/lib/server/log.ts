import { pino } from 'pino';
import { logLevel } from './env';

/** Structured lines on standard output. What could let somebody in is never written. */
export const logger = pino({
	level: logLevel(),
	base: undefined,
	timestamp: pino.stdTimeFunctions.isoTime,
	redact: [
		'password',
		'token',
		'authorization',
		'cookie',
		'*.password',
		'*.token',
		'*.authorization',
		'*.cookie'
	],
	serializers: { error: pino.stdSerializers.err }
});
