import { createHash, randomBytes } from 'node:crypto';
import { openDatabase } from './lib/database.mjs';
import { endOnSignal } from './lib/process.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { Refusal, runMain, say } from './lib/say.mjs';

const validDays = 90;

/** As lib/server/db/ids.ts makes them: 26 characters that sort by time. */
function newId() {
	const alphabet = '0123456789abcdefghjkmnpqrstvwxyz';
	let time = '';
	for (let rest = Date.now(), i = 0; i < 10; i++, rest = Math.floor(rest / 32))
		time = alphabet[rest % 32] + time;
	return time + [...randomBytes(16)].map((byte) => alphabet[byte & 31]).join('');
}

/**
 * `npm run token -- <email>`: a personal API token for a user of this copy, on the last line of the output.
 * Same form as lib/server/auth/tokens.ts; the integration test of people holds the two together.
 */
runMain(async () => {
	const email = process.argv[2]?.trim().toLowerCase();
	if (!email) throw new Refusal('Say for whom: npm run token -- owner@tiltyard.test');
	ensurePackages();
	const signals = endOnSignal();
	const opening = openDatabase();
	signals.add(() => opening.then((opened) => opened.stop()));
	const database = await signals.during(opening);
	const { createConnection } = await import('mysql2/promise');
	try {
		const connection = await createConnection({ uri: database.url, timezone: 'Z' });
		try {
			const [users] = await connection.query('SELECT id FROM users WHERE email = ?', [email]);
			const [user] = /** @type {{ id: string }[]} */ (users);
			if (!user)
				throw new Refusal(
					`Nobody here has the address ${email}: sign up on the pages first, or start once so that the demo is there.`
				);
			const token = `tyd_${randomBytes(32).toString('base64url')}`;
			const now = new Date();
			await connection.query('INSERT INTO api_tokens SET ?', {
				id: newId(),
				user_id: user.id,
				name: 'Command line',
				token_hash: createHash('sha256').update(token).digest('hex'),
				scopes: JSON.stringify(['read', 'write']),
				created_at: now,
				expires_at: new Date(now.getTime() + validDays * 86_400_000)
			});
			process.stderr.write(`Personal token for ${email}, valid for ${validDays} days, told only now:\n`);
			say(token);
		} finally {
			await connection.end();
		}
	} finally {
		await database.stop();
	}
});
