/** The import rules between the rooms of src/ (DEVELOPERS.md), read from the sources themselves. */
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';

const root = resolve(import.meta.dirname, '..');
const source = join(root, 'src');

interface Import {
	/** As it is written. */
	specifier: string;
	/** Path from src/ when it leads to one of our files, without asking for an extension. */
	path: string | null;
	typeOnly: boolean;
	dynamic: boolean;
}

interface Source {
	/** Path from src/. */
	path: string;
	imports: Import[];
}

const statement =
	/(?:^|[\n;}])\s*(?:import|export)\s+(type\s+)?(?:[^'"`;]*?\sfrom\s+)?(['"])([^'"]+)\2|\bimport\(\s*(['"])([^'"]+)\4\s*\)|new URL\(\s*(['"])([^'"]+)\6,\s*import\.meta\.url/g;

function importsOf(path: string, text: string): Import[] {
	// Words in comments are not imports.
	const code = text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/<!--[\s\S]*?-->/g, '');
	return [...code.matchAll(statement)].map((match) => {
		const specifier = match[3] ?? match[5] ?? match[7];
		const local = specifier.startsWith('$lib')
			? join('lib', specifier.slice(4))
			: specifier.startsWith('.')
				? relative(source, resolve(dirname(join(source, path)), specifier))
				: null;
		return { specifier, path: local, typeOnly: Boolean(match[1]), dynamic: match[3] === undefined };
	});
}

function readSources(folder = ''): Source[] {
	return readdirSync(join(source, folder), { withFileTypes: true }).flatMap((entry) => {
		const path = join(folder, entry.name);
		if (entry.isDirectory()) return readSources(path);
		if (!/\.(ts|js|svelte)$/.test(entry.name) || /\.(test|d)\.ts$/.test(entry.name)) return [];
		return [{ path, imports: importsOf(path, readFileSync(join(source, path), 'utf8')) }];
	});
}

const sources = readSources();

/** `core`, `server`, ... for what stands under lib/, else the first folder. */
function roomOf(path: string): string {
	const parts = path.split('/');
	return parts[0] === 'lib' ? parts[1].replace(/\.\w+$/, '') : parts[0];
}

const inRoom = (room: string) => sources.filter(({ path }) => roomOf(path) === room);

/** Every import that is not allowed, as "file → import". */
function broken(files: Source[], allowed: (found: Import, from: Source) => boolean): string[] {
	return files.flatMap((file) =>
		file.imports.filter((found) => !allowed(found, file)).map((found) => `${file.path} → ${found.specifier}`)
	);
}

const toRooms =
	(...rooms: string[]) =>
	({ path }: Import): boolean =>
		path === null || rooms.includes(roomOf(path));

const isPackage = ({ path, specifier }: Import, pattern: RegExp): boolean =>
	path === null && pattern.test(specifier);

/** The framework's own modules and Svelte. */
const framework = /^(svelte($|\/)|\$app\/|@sveltejs\/kit)/;
const sql = /^(drizzle-orm|mysql2)($|\/)/;
const scene = /^(three($|\/)|@threlte\/)/;

describe('the reader of imports', () => {
	it('sees static, type-only, side-effect, re-exporting and dynamic imports, and none in comments', () => {
		const text = `
			import a from './a';
			import type { B } from '$lib/core/b';
			import './c.css';
			export * from "../d";
			export {
				e
			} from './e';
			const f = await import('three');
			const g = new Worker(new URL('./g.ts', import.meta.url));
			/* import h from './h'; */
		`;
		const found = importsOf('lib/editor/x.ts', text);
		expect(found.map(({ specifier }) => specifier).sort()).toEqual(
			['./a', '$lib/core/b', './c.css', '../d', './e', 'three', './g.ts'].sort()
		);
		expect(found.find(({ specifier }) => specifier === '$lib/core/b')).toMatchObject({
			path: 'lib/core/b',
			typeOnly: true
		});
		expect(found.find(({ specifier }) => specifier === '../d')?.path).toBe('lib/d');
	});

	it('finds the sources', () => {
		for (const room of ['core', 'schema', 'access', 'server', 'routes']) expect(inRoom(room)).not.toEqual([]);
	});

	it('every import of ours leads to a file', () => {
		const endings = ['', '.ts', '.js', '.svelte', '.svelte.ts', '.d.ts', '/index.ts'];
		const missing = broken(
			sources,
			({ path, specifier }) =>
				path === null ||
				/\/\$types$/.test(specifier) ||
				endings.some((ending) => existsSync(join(source, path.replace(/\?.*$/, '') + ending))) ||
				existsSync(join(source, path.replace(/\.js$/, '.ts')))
		);
		expect(missing).toEqual([]);
	});
});

describe('rooms import only what they may', () => {
	it('core: itself by relative paths, nothing else at all', () => {
		expect(
			broken(
				inRoom('core'),
				({ specifier, path }) => specifier.startsWith('.') && path !== null && roomOf(path) === 'core'
			)
		).toEqual([]);
	});

	it('schema: core and the validator', () => {
		const rule = (found: Import) =>
			toRooms('schema', 'core')(found) && (found.path !== null || found.specifier === 'zod');
		expect(broken(inRoom('schema'), rule)).toEqual([]);
	});

	it('access: itself, core types and the validator', () => {
		const rule = (found: Import) =>
			toRooms('access', 'core')(found) &&
			(found.path === null ? found.specifier === 'zod' : roomOf(found.path) === 'access' || found.typeOnly);
		expect(broken(inRoom('access'), rule)).toEqual([]);
	});

	it.each(['sheets', 'exchange'])('%s: schema, core, i18n and format packages', (room) => {
		const rule = (found: Import) =>
			toRooms(room, 'schema', 'core', 'i18n')(found) &&
			![framework, sql, scene].some((pattern) => isPackage(found, pattern));
		expect(broken(inRoom(room), rule)).toEqual([]);
	});

	it('i18n: core', () => {
		expect(broken(inRoom('i18n'), toRooms('i18n', 'core'))).toEqual([]);
	});

	it('ui: i18n and component packages', () => {
		const rule = (found: Import) => toRooms('ui', 'i18n')(found) && !isPackage(found, scene);
		expect(broken(inRoom('ui'), rule)).toEqual([]);
	});

	it('charts: ui, schema, core and i18n', () => {
		const rule = (found: Import) =>
			toRooms('charts', 'ui', 'schema', 'core', 'i18n')(found) && !isPackage(found, scene);
		expect(broken(inRoom('charts'), rule)).toEqual([]);
	});

	it('editor: ui, charts, schema, access, core, i18n; its kernels only core and schema', () => {
		const editor = inRoom('editor');
		expect(broken(editor, toRooms('editor', 'ui', 'charts', 'schema', 'access', 'core', 'i18n'))).toEqual([]);
		const kernels = editor.filter(({ path }) => path.startsWith('lib/editor/kernels/'));
		const rule = ({ path }: Import) =>
			path !== null && (path.startsWith('lib/editor/kernels/') || ['core', 'schema'].includes(roomOf(path)));
		expect(broken(kernels, rule)).toEqual([]);
	});

	it('method: core, schema and i18n; what it measures with also exchange and general packages, at build and in tests only', () => {
		const isMeasure = (path: string | null) => path !== null && /^lib\/method\/measure(\/|$)/.test(path);
		const measures = ({ path }: Source) => isMeasure(path);
		const method = inRoom('method');
		const words = method.filter((file) => !measures(file));
		expect(words).not.toEqual([]);
		const virtual = ({ specifier }: Import) => specifier === 'virtual:measured-checks';
		const rule = (found: Import) =>
			(virtual(found) || found.path !== null) &&
			toRooms('method', 'schema', 'core', 'i18n')(found) &&
			!isMeasure(found.path);
		expect(broken(words, rule)).toEqual([]);
		expect(
			broken(
				method.filter(measures),
				(found) =>
					toRooms('method', 'schema', 'core', 'i18n', 'exchange')(found) &&
					![framework, sql, scene].some((pattern) => isPackage(found, pattern))
			)
		).toEqual([]);
		const others = sources.filter((file) => !measures(file));
		expect(broken(others, ({ path }) => !isMeasure(path))).toEqual([]);
	});

	it('server: all but editor, charts and ui; its worker entry only core and schema', () => {
		const rule = (found: Import) =>
			toRooms('server', 'schema', 'access', 'core', 'sheets', 'exchange', 'i18n')(found) &&
			!isPackage(found, scene);
		expect(broken(inRoom('server'), rule)).toEqual([]);
		const entries = inRoom('server').filter(({ path }) => path.endsWith('worker-entry.ts'));
		expect(
			broken(
				entries,
				({ path }) =>
					path === null || ['core', 'schema'].includes(roomOf(path)) || path.startsWith('lib/server/compute/')
			)
		).toEqual([]);
	});
});

describe('everywhere', () => {
	it('nobody imports routes but routes, by relative paths', () => {
		const rule = (found: Import, from: Source) =>
			found.path === null || !found.path.startsWith('routes/') || from.path.startsWith('routes/');
		expect(broken(sources, rule)).toEqual([]);
	});

	it('SQL stands only under lib/server', () => {
		const elsewhere = sources.filter(({ path }) => !path.startsWith('lib/server/'));
		expect(broken(elsewhere, (found) => !isPackage(found, sql))).toEqual([]);
	});

	it('pages and what they load in the browser never import lib/server, not even its types', () => {
		const inBrowser = sources.filter(
			({ path }) =>
				path.endsWith('.svelte') ||
				path.endsWith('.svelte.ts') ||
				/\+(page|layout)\.ts$/.test(path) ||
				path === 'hooks.client.ts'
		);
		expect(broken(inBrowser, ({ path }) => path === null || !path.startsWith('lib/server'))).toEqual([]);
	});

	it('3D packages stand only in the editor', () => {
		const elsewhere = sources.filter(({ path }) => roomOf(path) !== 'editor');
		expect(broken(elsewhere, (found) => !isPackage(found, scene))).toEqual([]);
	});

	it('no imports go in a circle', () => {
		const byPath = new Map(sources.map((file) => [file.path, file]));
		const fileOf = (path: string): string | null =>
			['', '.ts', '.js', '.svelte', '.svelte.ts', '/index.ts']
				.map((ending) => path + ending)
				.find((candidate) => byPath.has(candidate)) ?? null;
		const done = new Set<string>();
		const circles: string[] = [];
		const walk = (path: string, trail: string[]): void => {
			const at = trail.indexOf(path);
			if (at >= 0) {
				circles.push([...trail.slice(at), path].join(' → '));
				return;
			}
			if (done.has(path)) return;
			for (const found of byPath.get(path)!.imports) {
				if (found.path === null || found.typeOnly || found.dynamic) continue;
				const next = fileOf(found.path);
				if (next) walk(next, [...trail, path]);
			}
			done.add(path);
		};
		for (const { path } of sources) walk(path, []);
		expect(circles).toEqual([]);
	});

	it('an endpoint or page server file stays short: it parses, guards, calls a use case and answers', () => {
		const bodyLines = (path: string) =>
			readFileSync(join(source, path), 'utf8')
				.split('\n')
				.filter((line) => !line.startsWith('import ')).length;
		const long = sources
			.filter(({ path }) => /\+(server|page\.server|layout\.server)\.ts$/.test(path))
			.map(({ path }) => ({ path, lines: bodyLines(path) }))
			.filter(({ lines }) => lines > 50);
		expect(long).toEqual([]);
	});
});
