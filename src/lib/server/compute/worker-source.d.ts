/** A worker entry, bundled to one ESM string by the plugin in `scripts/worker-source-plugin.js`. */
declare module '*?worker-source' {
	const source: string;
	export default source;
}
