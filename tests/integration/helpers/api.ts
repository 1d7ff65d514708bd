/**
 * The API as a caller meets it: the server's hook (who asks, limits, refusals) around the route's own handler. Paths are
 * matched to route files as the framework does.
 */
import type { Cookies, RequestEvent } from '@sveltejs/kit';
import { createToken } from '$lib/server/auth/tokens';
import type { Actor } from '$lib/server/auth/actor';
import { handle } from '../../../src/hooks.server';

type Handler = (event: RequestEvent) => Promise<Response> | Response;
type RouteModule = Partial<Record<string, Handler>>;

const files = import.meta.glob<RouteModule>('/src/routes/api/**/+server.ts');

interface Route {
	/** As in the API table: `/api/v1/projects/{projectId}`. */
	path: string;
	pattern: RegExp;
	names: string[];
	load: () => Promise<RouteModule>;
}

/** Every route file under /api/v1. */
export const routes: Route[] = Object.entries(files)
	.map(([file, load]) => {
		const path = file.slice('/src/routes'.length, -'/+server.ts'.length).replace(/\[(\w+)\]/g, '{$1}');
		const names = [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name);
		const pattern = new RegExp(`^${path.replaceAll('.', '\\.').replace(/\{\w+\}/g, '([^/]+)')}$`);
		return { path, pattern, names, load };
	})
	.filter((route) => route.path.startsWith('/api/v1/'));

/** The methods that a route file answers. */
export async function methodsOf(route: Route): Promise<string[]> {
	return Object.keys(await route.load());
}

export interface ApiCall {
	token?: string;
	/** Sent as JSON unless it is text. */
	body?: unknown;
	headers?: Record<string, string>;
}

export interface ApiAnswer {
	status: number;
	headers: Headers;
	/** Parsed when it is JSON. */
	body: any; // eslint-disable-line @typescript-eslint/no-explicit-any -- a test reads whatever came
	text: string;
}

const noCookies: Cookies = {
	get: () => undefined,
	getAll: () => [],
	set: () => {},
	delete: () => {},
	serialize: () => ''
};

export async function callApiRaw(method: string, path: string, call: ApiCall = {}): Promise<Response> {
	const url = new URL(path, 'http://tiltyard.test');
	const route = routes.find((one) => one.pattern.test(url.pathname));
	if (!route) throw new Error(`no route file answers ${url.pathname}`);
	const values = route.pattern.exec(url.pathname)!.slice(1).map(decodeURIComponent);
	const headers = new Headers(call.headers);
	if (call.token) headers.set('authorization', `Bearer ${call.token}`);
	const sends = call.body !== undefined;
	if (sends && !headers.has('content-type')) headers.set('content-type', 'application/json');
	const body = !sends ? undefined : typeof call.body === 'string' ? call.body : JSON.stringify(call.body);
	const event = {
		url,
		request: new Request(url, { method, headers, body }),
		params: Object.fromEntries(route.names.map((name, index) => [name, values[index]])),
		route: { id: route.path },
		locals: {},
		cookies: noCookies,
		fetch,
		getClientAddress: () => '127.0.0.1',
		setHeaders: () => {},
		isDataRequest: false,
		isSubRequest: false
	} as unknown as RequestEvent;
	const handler = (await route.load())[method];
	if (!handler) throw new Error(`${route.path} does not answer ${method}`);
	return handle({ event, resolve: async (asked) => handler(asked) });
}

export async function callApi(method: string, path: string, call: ApiCall = {}): Promise<ApiAnswer> {
	const response = await callApiRaw(method, path, call);
	const text = await response.text();
	const isJson = /json/.test(response.headers.get('content-type') ?? '');
	return {
		status: response.status,
		headers: response.headers,
		body: isJson && text ? JSON.parse(text) : null,
		text
	};
}

/** A token that may do all that its person may. */
export async function tokenOf(actor: Actor): Promise<string> {
	return (await createToken(actor, { name: 'test', scopes: ['read', 'write'], expiresInDays: 1 })).token;
}
