import { orPageError } from '$lib/server/errors';
import { listLetters } from '$lib/server/mail/list-letters';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async () => ({ letters: await orPageError(listLetters()) });
