import { describe, expect, it } from 'vitest';
import { energyRequestSchema } from './energy';

const hour = 3600000;
const january = Date.UTC(2003, 0, 1);

/** Messages by field of a weather request with these spans; the light is invented. */
function refused(spans: { startMs: number; hours: number }[]): Record<string, string> {
	const light = Array(spans.reduce((sum, span) => sum + span.hours, 0)).fill(100);
	const answer = energyRequestSchema.safeParse({
		sky: {
			source: 'weather',
			name: 'Nowhere',
			latitudeDeg: 40,
			longitudeDeg: 10,
			altitudeM: 0,
			utcOffsetHours: 1,
			spans,
			ghi: light,
			dni: light,
			dhi: light
		}
	});
	if (answer.success) return {};
	return Object.fromEntries(answer.error.issues.map((issue) => [issue.path.join('.'), issue.message]));
}

describe('spans of weather hours', () => {
	it('may touch, leave gaps, and come from other years in any order', () => {
		expect(refused([{ startMs: january, hours: 8760 }])).toEqual({});
		expect(
			refused([
				{ startMs: january, hours: 744 },
				{ startMs: january + 744 * hour, hours: 24 },
				{ startMs: january + 900 * hour, hours: 24 },
				{ startMs: Date.UTC(1996, 1, 1), hours: 696 }
			])
		).toEqual({});
	});

	it('are refused where they share an hour, with the field and the remedy', () => {
		const first = { startMs: january, hours: 744 };
		const found = refused([first, { startMs: january + 743 * hour, hours: 24 }]);
		expect(Object.keys(found)).toEqual(['sky.spans.1']);
		expect(found['sky.spans.1']).toMatch(/overlap those of spans\.0\. Give every hour once/);
		expect(Object.keys(refused([first, { startMs: Date.UTC(1996, 1, 1), hours: 24 }, first]))).toEqual([
			'sky.spans.2'
		]);
		// Within a longer one, past a short one that it does not touch.
		expect(
			Object.keys(
				refused([
					first,
					{ startMs: january + 10 * hour, hours: 1 },
					{ startMs: january + 20 * hour, hours: 1 }
				])
			)
		).toEqual(['sky.spans.1', 'sky.spans.2']);
	});
});
