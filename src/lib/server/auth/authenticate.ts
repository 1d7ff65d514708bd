import type { RequestEvent } from '@sveltejs/kit';
import { isRefusedDemo } from '../env';
import { AppError } from '../errors';
import { readSession } from './session';
import { verifyToken } from './tokens';

const safeMethods = ['GET', 'HEAD', 'OPTIONS'];

/** Fills `event.locals` with who asks: by personal token on the API, else by the sign-in cookie. */
export async function authenticate(event: RequestEvent): Promise<void> {
	const { locals, request, url } = event;
	const onApi = url.pathname.startsWith('/api/');
	const authorization = request.headers.get('authorization');
	if (onApi && authorization !== null) {
		const token = /^Bearer +(\S+)$/i.exec(authorization)?.[1];
		const verified = token ? await verifyToken(token) : null;
		if (!verified || isRefusedDemo(verified.user.email))
			throw new AppError(
				'unauthorised',
				'This token is unknown, withdrawn or expired: make a new one and send it as "Authorization: Bearer …".'
			);
		locals.user = verified.user;
		locals.actor = { userId: verified.user.id };
		locals.token = { id: verified.tokenId, scopes: verified.scopes, expiresAt: verified.expiresAt };
		refuseBeyondScope(verified.scopes, request.method, url.pathname);
		return;
	}
	const session = await readSession(event.cookies);
	if (!session || isRefusedDemo(session.user.email)) return;
	locals.user = session.user;
	locals.actor = { userId: session.user.id };
	locals.sessionId = session.sessionId;
	// The framework checks the origin of forms; this does the same for JSON that rides on the cookie.
	const from = request.headers.get('origin');
	if (onApi && !safeMethods.includes(request.method) && from !== null && from !== url.origin)
		throw new AppError('not_allowed', 'A page of another site may not write here with your sign-in.');
}

/** `read` reads and computes (which stores nothing); everything else takes `write`. */
function refuseBeyondScope(scopes: readonly string[], method: string, path: string): void {
	const reads = safeMethods.includes(method) || path.startsWith('/api/v1/compute/');
	if (scopes.includes('write') || (reads && scopes.includes('read'))) return;
	throw new AppError('not_allowed', 'This token may only read: use one with the scope "write".');
}
