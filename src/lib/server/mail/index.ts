/** Letters that the application sends: through SMTP_URL when it is given, else to the local catcher. */
import { createTransport, type Transporter } from 'nodemailer';
import { isLocal, mailFrom, smtpUrl } from '../env';
import { AppError } from '../errors';
import { logger } from '../log';
import { startCatcher } from './catcher';

export interface Letter {
	to: string;
	subject: string;
	/** Plain text. */
	text: string;
}

/** Kept on the process: a development reload evaluates this module again and must not open another catcher. */
const shelf = globalThis as typeof globalThis & { tiltyardMail?: Promise<Transporter | null> };

async function open(): Promise<Transporter | null> {
	const outside = smtpUrl();
	if (outside) return createTransport(outside);
	if (!isLocal()) return null;
	const port = await startCatcher();
	logger.info({ port }, 'letters go to the local catcher and can be read at /mailbox');
	return createTransport({ host: '127.0.0.1', port, secure: false, ignoreTLS: true });
}

/** Opens the way out early, so that a wrong setting shows at the start and not with the first letter. */
export async function startMail(): Promise<void> {
	shelf.tiltyardMail ??= open();
	const transport = await shelf.tiltyardMail;
	if (!transport) logger.warn('SMTP_URL is not set: no letters can be sent, so forgotten passwords stay so');
}

/** Throws when this copy can't send letters at all. */
export async function requireMail(): Promise<Transporter> {
	shelf.tiltyardMail ??= open();
	const transport = await shelf.tiltyardMail;
	if (transport) return transport;
	throw new AppError(
		'unavailable',
		'This copy can send no letters: whoever runs it has to set SMTP_URL. Ask them for help with your account.'
	);
}

export async function sendLetter(letter: Letter): Promise<void> {
	const transport = await requireMail();
	await transport.sendMail({ from: mailFrom(), ...letter });
	logger.info({ subject: letter.subject }, 'letter sent');
}
