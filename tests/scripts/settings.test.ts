import { afterEach, describe, expect, it } from 'vitest';
import { appEnvironment, demoAllowed } from '../../scripts/lib/settings.mjs';

const before = process.env.NODE_ENV;
afterEach(() => {
	process.env.NODE_ENV = before;
});

const local = (host: string, origin: string) =>
	appEnvironment({ url: 'mysql://x', ownDatabase: true, host, origin }).TILTYARD_LOCAL;

describe('the mailbox, whose letters hold links that set passwords', () => {
	it.each([
		['127.0.0.1', 'http://127.0.0.1:3000'],
		['localhost', 'http://localhost:3000'],
		['::1', 'http://[::1]:3000']
	])('is open on %s as %s', (host, origin) => {
		expect(local(host, origin)).toBe('1');
	});

	it.each([
		['0.0.0.0', 'http://127.0.0.1:3000'],
		['::', 'http://127.0.0.1:3000'],
		['192.168.1.4', 'http://192.168.1.4:3000'],
		['127.0.0.1', 'https://tiltyard.example.org'],
		['127.0.0.1', 'http://127.0.0.1.example.org'],
		['127.0.0.1', 'not an address']
	])('is shut where others can reach it: %s as %s', (host, origin) => {
		expect(local(host, origin)).toBe('0');
	});
});

describe('the demo', () => {
	it('is refused only with NODE_ENV=production on an outside database', () => {
		process.env.NODE_ENV = 'production';
		expect(demoAllowed(false)).toBe(false);
		expect(demoAllowed(true)).toBe(true);
		process.env.NODE_ENV = 'development';
		expect(demoAllowed(false)).toBe(true);
	});
});
