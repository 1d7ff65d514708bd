import type { RequestEvent } from '@sveltejs/kit';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { FORM_BYTES } from './body-limit';
import { answerForm } from './read-form';

const shape = z.object({ name: z.string() });

function send(body: BodyInit, type?: string) {
	const request = new Request('http://tiltyard.test/form', {
		method: 'POST',
		body,
		...(type ? { headers: { 'content-type': type } } : {}),
		...(body instanceof ReadableStream ? { duplex: 'half' } : {})
	} as RequestInit);
	const taken: string[] = [];
	const answer = answerForm({ request } as RequestEvent, shape, async ({ name }) => void taken.push(name));
	return { answer, taken };
}

const refusal = (status: number) => expect.objectContaining({ status });

describe('a form', () => {
	it('is read when it is URL-encoded or multipart', async () => {
		const encoded = send(new URLSearchParams({ name: 'Ada' }));
		expect(await encoded.answer).toEqual({ done: true });
		const form = new FormData();
		form.set('name', 'Béla');
		const multipart = send(form);
		expect(await multipart.answer).toEqual({ done: true });
		expect([...encoded.taken, ...multipart.taken]).toEqual(['Ada', 'Béla']);
	});

	it('that is broken off or says no boundary is the mistake of who sent it', async () => {
		for (const type of ['multipart/form-data; boundary=x', 'multipart/form-data']) {
			const { answer, taken } = send('--x\r\ncontent-disposition: form-data; name="na', type);
			await expect(answer).rejects.toEqual(refusal(400));
			expect(taken).toEqual([]);
		}
	});

	it('of another type is refused as such', async () => {
		await expect(send('name=Ada', 'text/plain').answer).rejects.toEqual(refusal(415));
	});

	it('that is longer than it said is not read to its end', async () => {
		let sent = 0;
		const endless = new ReadableStream<Uint8Array>({
			pull(controller) {
				sent += 65_536;
				controller.enqueue(new Uint8Array(65_536).fill(97));
			}
		});
		const { answer } = send(endless, 'application/x-www-form-urlencoded');
		await expect(answer).rejects.toEqual(refusal(413));
		expect(sent).toBeLessThan(2 * FORM_BYTES);
	});
});
