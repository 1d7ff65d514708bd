import { defineConfig } from '@playwright/test';

/** The built application on a database of its own; `npm test` chooses a free port. */
const port = Number(process.env.E2E_PORT ?? 4173);

export default defineConfig({
	testDir: 'tests/e2e',
	testMatch: '**/*.test.ts',
	outputDir: 'test-results',
	workers: 1,
	fullyParallel: false,
	retries: 0,
	forbidOnly: true,
	// Generous: a software rasteriser on two cores is slow, and a busy machine slower.
	timeout: 240_000,
	expect: { timeout: 30_000 },
	reporter: process.env.PLAYWRIGHT_JSON_OUTPUT_NAME ? [['line'], ['json']] : [['list']],
	use: {
		baseURL: `http://127.0.0.1:${port}`,
		viewport: { width: 1280, height: 800 },
		locale: 'en-GB',
		timezoneId: 'Europe/Rome',
		trace: 'retain-on-failure',
		screenshot: 'only-on-failure',
		launchOptions: {
			executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
			args: [
				'--no-sandbox',
				'--use-angle=swiftshader',
				'--enable-unsafe-swiftshader',
				'--disable-quic',
				'--no-first-run',
				'--disable-background-networking',
				'--disable-component-update',
				'--disable-sync'
			]
		}
	},
	webServer: {
		command: 'node scripts/serve-for-tests.mjs',
		url: `http://127.0.0.1:${port}/healthz`,
		// The server ends with this process, however that ends.
		env: { E2E_PORT: String(port), E2E_OWNER: String(process.pid) },
		timeout: 240_000,
		reuseExistingServer: !process.env.CI && !process.env.PLAYWRIGHT_JSON_OUTPUT_NAME,
		gracefulShutdown: { signal: 'SIGTERM', timeout: 30_000 },
		stdout: 'ignore',
		stderr: 'pipe'
	}
});
