import { createTransport } from 'nodemailer';
import { describe, expect, it } from 'vitest';
import { readLetter } from './read-letter';

/** A letter as the application's own mailer puts it on the wire. */
async function written(subject: string, text: string): Promise<string> {
	const transport = createTransport({ streamTransport: true, buffer: true, newline: 'windows' });
	const sent = await transport.sendMail({ from: 'a@tiltyard.test', to: 'b@tiltyard.test', subject, text });
	return (sent.message as Buffer).toString('utf8');
}

describe('a letter taken in by the catcher', () => {
	const long = `https://tiltyard.test/reset/${'a1B2='.repeat(40)}`;
	it.each([
		['plain', 'Set a new password', 'Hello.\n\nTwo paragraphs.'],
		['a long link, which the writer breaks', 'A link', `Follow\n\n${long}\n\nwithin the hour.`],
		['letters beyond ASCII', 'Bergström’s größte Fläche', 'Grüße von der Wiese – 12,5 °'],
		['mostly not ASCII', 'Поле', 'Солнце над полем, тень на снегу']
	])('comes out as it was written: %s', async (_what, subject, text) => {
		expect(readLetter(await written(subject, text))).toEqual({ subject, text });
	});
});
