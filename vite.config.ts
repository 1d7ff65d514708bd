import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'vitest/config';
import { measuredChecks } from './scripts/measured-checks-plugin.js';
import { workerSource } from './scripts/worker-source-plugin.js';

export default defineConfig({
	plugins: [workerSource(), measuredChecks(), tailwindcss(), sveltekit()],
	test: {
		environment: 'node',
		include: ['src/**/*.test.ts', 'tests/**/*.test.ts'],
		exclude: ['tests/e2e/**', 'node_modules/**']
	}
});
