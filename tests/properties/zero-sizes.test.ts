/** Things without a size never reach the core: each is refused by its field and with what to give instead. */
import { describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { sceneObstacleSchema, sceneTableSchema } from '../../src/lib/schema/compute';
import { obstacleSchema } from '../../src/lib/schema/obstacle';
import { trackerModelShape } from '../../src/lib/schema/tracker-model';

const at = { eastM: 0, northM: 0 };
const cases: [string, z.ZodType, Record<string, unknown>, string[]][] = [
	[
		'a table of a scene',
		sceneTableSchema,
		{ id: 'a', ...at, upM: 3, widthM: 6, heightM: 4, azimuthDeg: 180, tiltDeg: 60 },
		['widthM', 'heightM']
	],
	[
		'a box of a scene',
		sceneObstacleSchema,
		{ kind: 'box', ...at, baseM: 0, sizeXM: 1, sizeYM: 1, heightM: 1, turnDeg: 0 },
		['sizeXM', 'sizeYM', 'heightM']
	],
	[
		'a prism of a scene',
		sceneObstacleSchema,
		{ kind: 'prism', sides: 6, ...at, baseM: 0, bottomRadiusM: 1, topRadiusM: 0, heightM: 2 },
		['sides', 'heightM', 'bottomRadiusM']
	],
	[
		'a box on the plot',
		obstacleSchema,
		{ id: 'b', kind: 'box', name: '', ...at, sizeXM: 1, sizeYM: 1, heightM: 1, turnDeg: 0 },
		['sizeXM', 'sizeYM', 'heightM']
	],
	[
		'a tree on the plot',
		obstacleSchema,
		{
			...{ id: 't', kind: 'tree', name: '', ...at, heightM: 8, crownBaseM: 2, crownRadiusM: 2 },
			...{ trunkRadiusM: 0.2, crownTransmission: 0.4, growthMPerYear: 0, maxHeightM: 8 }
		},
		['heightM', 'crownRadiusM', 'maxHeightM']
	],
	[
		'a wall on the plot',
		obstacleSchema,
		{
			...{ id: 'w', kind: 'wall', name: '', ...at, heightM: 2, thicknessM: 0.2, transmission: 0 },
			line: [
				[0, 0],
				[5, 0]
			]
		},
		['heightM', 'thicknessM']
	],
	[
		'a mast on the plot',
		obstacleSchema,
		{ id: 'm', kind: 'mast', name: '', ...at, heightM: 9, radiusM: 0.2 },
		['heightM', 'radiusM']
	]
];

describe('zero sizes are refused', () => {
	it.each(cases)('%s', (_, schema, whole, fields) => {
		expect(schema.safeParse(whole).success).toBe(true);
		for (const field of fields) {
			const answer = schema.safeParse({ ...whole, [field]: 0 });
			expect(answer.success, field).toBe(false);
			const issues = answer.error?.issues.filter(({ path }) => path.includes(field)) ?? [];
			expect(issues[0]?.message, field).toMatch(/^(Give|Keep|The) .{10,}\.$/);
		}
	});

	it('a prism that is nothing at both ends says which radius to give', () => {
		const point = { kind: 'prism', sides: 6, ...at, baseM: 0, bottomRadiusM: 0, topRadiusM: 0, heightM: 2 };
		const answer = sceneObstacleSchema.safeParse(point);
		expect(answer.error?.issues[0]).toMatchObject({
			path: ['bottomRadiusM'],
			message: expect.stringMatching(/radius at its bottom or its top/)
		});
	});

	it('a tracker model', () => {
		for (const field of ['widthM', 'heightM', 'axisHeightM', 'moduleColumns', 'moduleRows'] as const) {
			const answer = trackerModelShape[field].safeParse(0);
			expect(answer.error?.issues[0].message, field).toMatch(/^Give a (whole )?number from /);
		}
	});
});
