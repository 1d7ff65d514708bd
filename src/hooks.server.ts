import {
	error,
	redirect,
	type Handle,
	type HandleServerError,
	type RequestEvent,
	type ServerInit
} from '@sveltejs/kit';
import { authenticate } from '$lib/server/auth/authenticate';
import { closeDatabase } from '$lib/server/db';
import { seedDemo } from '$lib/server/demo';
import { isLocal, origin, seedsDemo } from '$lib/server/env';
import { asAppError, errorOfStatus, problemResponse } from '$lib/server/errors';
import { refuseLongBody } from '$lib/server/http/body-limit';
import { secure } from '$lib/server/http/headers';
import { newRequestId } from '$lib/server/http/request-id';
import { startJobs, stopJobs } from '$lib/server/jobs';
import { logger } from '$lib/server/log';
import { startMail } from '$lib/server/mail';

export const init: ServerInit = async () => {
	await startMail();
	startJobs();
	if (seedsDemo()) await seedDemo();
	// The server has let go of its connections: give back the runs in work, then let go of the database too, so that
	// the process can end.
	process.once('sveltekit:shutdown', () => {
		stopJobs()
			.then(closeDatabase)
			.then(
				() => process.exit(0),
				(reason: unknown) => {
					logger.error({ error: reason }, 'the server did not end as it should');
					process.exit(1);
				}
			);
	});
};

export const handle: Handle = async ({ event, resolve }) => {
	const began = performance.now();
	const { locals, url, request } = event;
	Object.assign(locals, { requestId: newRequestId(), actor: null, user: null, sessionId: null, token: null });
	sendToOneAddress(request, url);

	let response: Response;
	try {
		refuseLongBody(url.pathname, request.headers.get('content-length'));
		await authenticate(event);
		response = await asProblem(await resolve(event), event);
	} catch (thrown) {
		// Refused at the door; refusals further in are answered by the page or endpoint that was asked.
		const refused = asAppError(thrown);
		if (!refused) throw thrown;
		if (!url.pathname.startsWith('/api/'))
			error(refused.status, { message: refused.message, reference: locals.requestId });
		response = problemResponse(refused, locals.requestId);
	}
	secure(response, url, locals.requestId);
	if (url.pathname !== '/healthz')
		logger.info({
			requestId: locals.requestId,
			method: request.method,
			// A route with a secret in its address is logged without it.
			path: event.params.token ? event.route.id : url.pathname,
			status: response.status,
			userId: locals.actor?.userId,
			ms: Math.round(performance.now() - began)
		});
	return response;
};

/** What the framework itself refuses on the API (an unknown path, a wrong method, a failure) speaks problem details too. */
async function asProblem(response: Response, { url, locals }: RequestEvent): Promise<Response> {
	const type = response.headers.get('content-type') ?? '';
	if (!url.pathname.startsWith('/api/') || response.status < 400 || type.startsWith('application/problem'))
		return response;
	const body: unknown = type.startsWith('application/json') ? await response.json() : null;
	const message =
		body !== null && typeof body === 'object' && 'message' in body
			? String(body.message)
			: response.status === 405
				? `This address does not take that method, only ${response.headers.get('allow') ?? 'others'}.`
				: 'The request was refused.';
	const problem = problemResponse(errorOfStatus(response.status, message), locals.requestId);
	const allow = response.headers.get('allow');
	if (allow) problem.headers.set('allow', allow);
	return problem;
}

/**
 * A copy on one's own machine is opened as localhost as often as by its printed address, but sign-in and the
 * check of where a form comes from hold for one address only: lead people there.
 */
function sendToOneAddress(request: Request, url: URL): void {
	const home = origin();
	const host = request.headers.get('host');
	if (!isLocal() || !home || !host?.startsWith('localhost') || request.method !== 'GET') return;
	const there = new URL(home);
	if (there.host !== host && there.hostname === '127.0.0.1')
		redirect(307, there.origin + url.pathname + url.search);
}

export const handleError: HandleServerError = ({ error: thrown, event, status, message }) => {
	const reference = event.locals.requestId ?? newRequestId();
	const refused = asAppError(thrown);
	if (status === 404 && !refused)
		return { message: 'There is nothing at this address, or it is not yours to see.', reference };
	// What the asker did wrong is no failure of ours: it must not fill the log of failures.
	logger[status >= 500 ? 'error' : 'info'](
		{ requestId: reference, route: event.route.id, method: event.request.method, status, error: thrown },
		message
	);
	return {
		message:
			refused?.message ??
			(status >= 500
				? `Something failed on our side. What you had saved is safe. Try again; if it happens again, tell the reference ${reference}.`
				: message),
		reference
	};
};
