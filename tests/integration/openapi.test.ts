import { describe, expect, it } from 'vitest';
import { openApiDocument } from '$lib/server/api/openapi';
import { allCalls } from '$lib/server/api/table';
import { methodsOf, routes } from './helpers/api';

interface Described {
	openapi: string;
	paths: Record<string, Record<string, { operationId: string; responses: Record<string, unknown> }>>;
	components: { schemas: Record<string, unknown> };
}

const described = openApiDocument() as unknown as Described;

describe('the OpenAPI document', () => {
	it('is 3.1 and has a line for every method of every route file, and no other', async () => {
		expect(described.openapi).toBe('3.1.0');
		const stands: string[] = [];
		for (const route of routes)
			for (const method of await methodsOf(route)) stands.push(`${method} ${route.path}`);
		const listed = allCalls().map(([, spec]) => `${spec.method} ${spec.path}`);
		expect(listed.sort()).toEqual(stands.sort());
		for (const [id, spec] of allCalls()) {
			expect(described.paths[spec.path][spec.method.toLowerCase()].operationId).toBe(id);
		}
	});

	it('is plain JSON whose references all lead somewhere', () => {
		const text = JSON.stringify(described);
		for (const [, name] of text.matchAll(/"\$ref":"#\/components\/schemas\/(\w+)"/g)) {
			expect(described.components.schemas).toHaveProperty(name);
		}
		expect(text).not.toContain('"$ref":"#/$defs');
	});

	it('tells the ranges that validation holds to', () => {
		const sun = JSON.stringify(described.paths['/api/v1/compute/sun'].post);
		expect(sun).toContain('"minimum":-90');
		expect(sun).toContain('"maximum":90');
	});
});
