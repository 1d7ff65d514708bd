import { desc } from 'drizzle-orm';
import { db } from '../db';
import { mailbox } from '../db/schema';
import { isLocal } from '../env';
import { notFound } from '../errors';

/** The newest letters of the local catcher. There is no such place when the copy is not local. */
export async function listLetters() {
	if (!isLocal()) throw notFound();
	const rows = await db.select().from(mailbox).orderBy(desc(mailbox.at), desc(mailbox.id)).limit(50);
	return rows.map(({ id, to, subject, text, at }) => ({ id, to, subject, text, at: at.toISOString() }));
}
