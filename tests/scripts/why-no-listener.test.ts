import { createServer, type AddressInfo } from 'node:net';
import { expect, it } from 'vitest';
import { freePort, whyNoListener } from '../../scripts/lib/process.mjs';

it('a free port has no objection', async () => {
	expect(await whyNoListener('127.0.0.1', await freePort())).toBeNull();
});

it('a taken port is named with a way out', async () => {
	const server = createServer();
	await new Promise<void>((resume) => server.listen(0, '127.0.0.1', resume));
	const { port } = server.address() as AddressInfo;
	const said = await whyNoListener('127.0.0.1', port);
	server.close();
	expect(said).toContain(`Port ${port} on 127.0.0.1 is taken`);
	expect(said).toContain(`PORT=${port + 1}`);
});

it('an address that is not of this machine is not called a taken port', async () => {
	// 192.0.2.0/24 is kept for documentation (RFC 5737): no machine has it.
	const said = await whyNoListener('192.0.2.1', 3000);
	expect(said).toContain('HOST is "192.0.2.1"');
	expect(said).not.toContain('taken');
});
