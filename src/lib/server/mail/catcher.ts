import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import { db } from '../db';
import { newId } from '../db/ids';
import { mailbox } from '../db/schema';
import { logger } from '../log';
import { readLetter } from './read-letter';

/** Longer letters are none of ours. */
const mostBytes = 1024 * 1024;

/**
 * A mail server on loopback that takes every letter in and puts it into the mailbox table.
 * @returns the port it listens on
 */
export function startCatcher(): Promise<number> {
	const server = new SMTPServer({
		authOptional: true,
		disabledCommands: ['AUTH', 'STARTTLS'],
		size: mostBytes,
		onData(stream, session, done) {
			const chunks: Buffer[] = [];
			stream.on('data', (chunk: Buffer) => chunks.push(chunk));
			stream.on('end', () => {
				const letter = readLetter(Buffer.concat(chunks).toString('utf8'));
				const at = new Date();
				const rows = session.envelope.rcptTo.map(({ address }) => ({
					id: newId(),
					to: address,
					subject: letter.subject.slice(0, 255),
					text: letter.text,
					at
				}));
				db.insert(mailbox)
					.values(rows)
					.then(
						() => done(),
						(error: Error) => done(error)
					);
			});
		}
	});
	server.on('error', (error) => logger.error({ error }, 'the local mail catcher failed'));
	return new Promise((resolve, reject) => {
		server.once('error', reject);
		const listener = server.listen(0, '127.0.0.1', () => {
			// The catcher alone keeps no process alive.
			server.server.unref();
			resolve((listener.address() as AddressInfo).port);
		});
	});
}
