/** Measured by the plugin in `scripts/measured-checks-plugin.js` while the application is built. */
declare module 'virtual:measured-checks' {
	import type { MethodReport } from '$lib/method/report';
	const report: MethodReport;
	export default report;
}
