import { z } from 'zod';
import { problemSchema } from '$lib/schema/problem';
import { allCalls } from './table';
import type { CallSpec } from './spec';

type Json = Record<string, unknown>;

/** JSON Schema of a shape: what comes in is described before defaults are filled in, what goes out after. */
function jsonSchema(shape: z.ZodType, io: 'input' | 'output'): Json {
	const { $schema: _dialect, ...schema } = z.toJSONSchema(shape, { io, unrepresentable: 'any' });
	return schema;
}

const problem = (description: string) => ({
	description,
	content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } }
});

function parameters(spec: CallSpec): Json[] {
	const found: Json[] = [...spec.path.matchAll(/\{(\w+)\}/g)].map(([, name]) => ({
		name,
		in: 'path',
		required: true,
		schema: { type: 'string' }
	}));
	if (spec.query) {
		const { properties = {} } = jsonSchema(spec.query, 'input') as { properties?: Record<string, Json> };
		for (const [name, schema] of Object.entries(properties)) {
			found.push({ name, in: 'query', required: false, schema });
		}
	}
	if (spec.ifMatch) {
		found.push({
			name: 'If-Match',
			in: 'header',
			required: true,
			description: 'The ETag that the change was made on, such as "12".',
			schema: { type: 'string' }
		});
	}
	return found;
}

function responses(spec: CallSpec): Json {
	const { status, description, schema, mediaType = 'application/json', etag } = spec.answer;
	const good: Json = { description };
	if (status !== 204) {
		good.content = { [mediaType]: { schema: schema ? jsonSchema(schema, 'output') : { type: 'string' } } };
	}
	if (etag) good.headers = { ETag: { description: 'The revision', schema: { type: 'string' } } };
	const all: Json = { [String(status)]: good };
	if (spec.scope !== null) {
		all['401'] = problem('Not signed in, or a token that does not hold');
		all['429'] = problem('Too many calls; see Retry-After');
	}
	if (spec.path.includes('{')) {
		all['403'] = problem('Your role here does not reach so far');
		all['404'] = problem('Nothing there, or not yours to see');
	}
	if (spec.ifMatch) {
		all['412'] = problem('Stale; currentRevision tells the one that stands');
		all['428'] = problem('If-Match is missing');
	}
	if (spec.body) {
		all['400'] = problem('Not JSON, or not UTF-8');
		all['413'] = problem(`More than ${spec.maxBytes} bytes`);
		all['415'] = problem('Not application/json');
	}
	if (spec.body || spec.query) all['422'] = problem('Fields that are not right, each with what to do');
	return all;
}

function operation(id: string, spec: CallSpec): Json {
	const described: Json = {
		operationId: id,
		summary: spec.summary,
		tags: [spec.tag],
		parameters: parameters(spec),
		responses: responses(spec)
	};
	if (spec.scope === null) described.security = [];
	if (spec.body) {
		described.requestBody = {
			required: true,
			content: { 'application/json': { schema: jsonSchema(spec.body, 'input') } }
		};
	}
	return described;
}

let made: Json | null = null;

/** The OpenAPI 3.1 description of every call, made from the shapes that validate. */
export function openApiDocument(): Json {
	if (made) return made;
	const paths: Record<string, Json> = {};
	for (const [id, spec] of allCalls()) {
		paths[spec.path] = { ...paths[spec.path], [spec.method.toLowerCase()]: operation(id, spec) };
	}
	made = {
		openapi: '3.1.0',
		info: {
			title: 'Tiltyard',
			version: '1',
			description:
				'Layout, shade and sensor mounts of fields of dual-axis trackers. Metres, degrees clockwise from true ' +
				'north, ISO 8601 times. Lists page by nextCursor. Errors are problem details (RFC 9457).'
		},
		servers: [{ url: '/' }],
		security: [{ token: [] }, { session: [] }],
		paths,
		components: {
			schemas: { Problem: jsonSchema(problemSchema, 'output') },
			securitySchemes: {
				token: { type: 'http', scheme: 'bearer', description: 'A personal token' },
				session: { type: 'apiKey', in: 'cookie', name: 'tiltyard_session' }
			}
		}
	};
	return made;
}
