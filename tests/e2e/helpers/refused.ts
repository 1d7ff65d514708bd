import { expect, type APIRequestContext } from '@playwright/test';

/** The API answers with this status and problem details that say what to do. */
export async function expectProblem(
	request: APIRequestContext,
	method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE',
	path: string,
	status: number,
	options: { data?: unknown; headers?: Record<string, string> } = {}
): Promise<void> {
	const response = await request.fetch(path, { method, ...options });
	expect(response.status(), `${method} ${path}: ${await response.text()}`).toBe(status);
	expect(response.headers()['content-type']).toContain('application/problem+json');
	const problem = await response.json();
	expect(problem).toMatchObject({ status, title: expect.any(String), type: expect.any(String) });
	expect(problem.detail.length).toBeGreaterThan(10);
}

/** A page answers a stranger as if it were not there. */
export async function expectHidden(request: APIRequestContext, path: string): Promise<void> {
	const response = await request.get(path, { maxRedirects: 0 });
	expect(response.status(), path).toBe(404);
}
