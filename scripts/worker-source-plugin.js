import { build } from 'vite';

const SUFFIX = '?worker-source';

/**
 * `import source from './entry.ts?worker-source'` gives the entry, bundled with all it imports, as one string of ESM.
 * A worker thread cannot be started from a module of the server build, since the build moves and merges modules; text
 * that the server writes to a file of its own always can.
 * @returns {import('vite').Plugin}
 */
export function workerSource() {
	return {
		name: 'worker-source',
		enforce: 'pre',
		async load(id) {
			if (!id.endsWith(SUFFIX)) return null;
			const entry = id.slice(0, -SUFFIX.length);
			const built = await build({
				configFile: false,
				logLevel: 'error',
				build: {
					write: false,
					ssr: entry,
					target: 'node20',
					minify: false,
					rolldownOptions: { output: { format: 'es', codeSplitting: false } }
				},
				ssr: { noExternal: true }
			});
			const output = [built].flat().flatMap((one) => ('output' in one ? one.output : []));
			const chunks = output.filter((one) => one.type === 'chunk');
			if (chunks.length !== 1) throw new Error(`${entry} must bundle to one module, not ${chunks.length}`);
			for (const file of chunks[0].moduleIds) {
				if (!file.startsWith('\0')) this.addWatchFile(file);
			}
			return { code: `export default ${JSON.stringify(chunks[0].code)};`, moduleType: 'js', map: null };
		}
	};
}
