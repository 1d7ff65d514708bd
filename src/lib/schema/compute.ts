import { z } from 'zod';
import { quantity, wholeNumber } from './quantity';
import { trackerModelShape } from './tracker-model';

/** Shapes of the stateless calculations. Unknown fields are passed over, so that a scene may carry its own notes. */

export const MAX_SCENE_TABLES = 2_000;
export const MAX_SCENE_OBSTACLES = 500;
export const MAX_FIELD_LOSS_TRACKERS = 2_000;
export const MAX_SUN_TIMES = 100_000;

/** Whatever the caller names things by. */
const idSchema = z
	.string({ error: 'Give an id as text.' })
	.min(1, { error: 'Give an id.' })
	.max(64, { error: 'Keep an id within 64 characters.' });

const azimuthDeg = quantity(-360, 720, 'degrees clockwise from true north');
const latitudeDeg = quantity(-90, 90, 'degrees, north positive');
const longitudeDeg = quantity(-180, 180, 'degrees, east positive');
const metres = quantity(-100_000, 100_000, 'm');
const sizeM = quantity(0.001, 10_000, 'm');

const moment = z
	.string({ error: 'Give a time as ISO 8601 with an offset, such as 2026-12-21T11:00:00Z.' })
	.refine((text) => /(Z|[+-]\d\d:?\d\d)$/.test(text) && Number.isFinite(Date.parse(text)), {
		error: 'Give a time as ISO 8601 with an offset, such as 2026-12-21T11:00:00Z.'
	})
	.refine((text) => Math.abs(new Date(Date.parse(text)).getUTCFullYear() - 2000) <= 100, {
		error: 'Give a time between the years 1900 and 2100.'
	});

export const sunRequestSchema = z.object({
	latitudeDeg,
	longitudeDeg,
	elevationM: quantity(-450, 9000, 'm').default(0),
	times: z
		.array(moment, { error: 'Give a list of times.' })
		.min(1, { error: 'Give at least one time.' })
		.max(MAX_SUN_TIMES, { error: `Give at most ${MAX_SUN_TIMES} times.` })
});

export const sunAnswerSchema = z.object({
	positions: z.array(
		z.object({
			time: z.string(),
			azimuthDeg: z.number(),
			elevationDeg: z.number(),
			apparentElevationDeg: z.number()
		})
	)
});

const sceneSun = z.object({ azimuthDeg, elevationDeg: quantity(-90, 90, 'degrees above level') });

const tablePlace = {
	id: idSchema,
	eastM: metres,
	northM: metres,
	upM: metres,
	widthM: sizeM,
	heightM: sizeM
};
const tiltDeg = quantity(0, 180, 'degrees from level');

export const sceneTableSchema = z.object({ ...tablePlace, azimuthDeg, tiltDeg });

export const sceneObstacleSchema = z.discriminatedUnion(
	'kind',
	[
		z.object({
			kind: z.literal('box'),
			eastM: metres,
			northM: metres,
			baseM: metres,
			sizeXM: sizeM,
			sizeYM: sizeM,
			heightM: sizeM,
			turnDeg: quantity(-720, 720, 'degrees')
		}),
		z
			.object({
				kind: z.literal('prism'),
				sides: wholeNumber(3, 200),
				eastM: metres,
				northM: metres,
				baseM: metres,
				bottomRadiusM: quantity(0, 10_000, 'm'),
				topRadiusM: quantity(0, 10_000, 'm'),
				heightM: sizeM
			})
			.refine(({ bottomRadiusM, topRadiusM }) => Math.max(bottomRadiusM, topRadiusM) >= 0.001, {
				path: ['bottomRadiusM'],
				error: 'Give the prism a radius at its bottom or its top.'
			})
	],
	{ error: 'Give an obstacle of kind "box" or "prism".' }
);

const sceneObstacles = z
	.array(sceneObstacleSchema)
	.max(MAX_SCENE_OBSTACLES, { error: `Give at most ${MAX_SCENE_OBSTACLES} obstacles.` })
	.default([]);

const sceneSkyline = z
	.array(z.object({ azimuthDeg: quantity(0, 360, 'degrees'), elevationDeg: quantity(-90, 90, 'degrees') }))
	.max(3_600, { error: 'Give at most 3600 skyline points.' })
	.default([]);

function refuseTwins(listed: { id: string }[], list: string, context: z.RefinementCtx): void {
	const seen = new Set<string>();
	listed.forEach(({ id }, index) => {
		if (seen.has(id)) {
			context.addIssue({ code: 'custom', path: [list, index, 'id'], message: 'This id is used twice.' });
		}
		seen.add(id);
	});
}

export const shadeRequestSchema = z
	.object({
		sun: sceneSun,
		tables: z
			.array(sceneTableSchema)
			.min(1, { error: 'Give at least one table.' })
			.max(MAX_SCENE_TABLES, { error: `Give at most ${MAX_SCENE_TABLES} tables.` }),
		obstacles: sceneObstacles,
		skyline: sceneSkyline
	})
	.superRefine((scene, context) => refuseTwins(scene.tables, 'tables', context));

export const shadeAnswerSchema = z.object({
	tables: z.array(
		z.object({
			id: z.string(),
			shadedShare: z.number(),
			frontLit: z.boolean(),
			hiddenBySkyline: z.boolean()
		})
	)
});

const edges = ['top', 'bottom', 'left', 'right'] as const;

/** Points of a mount scene times its steps, so that one call stays short. */
export const MAX_MOUNT_RAYS = 4_000_000;

export const mountRequestSchema = z
	.object({
		tables: z
			.array(z.object(tablePlace))
			.min(1, { error: 'Give at least one table.' })
			.max(MAX_SCENE_TABLES, { error: `Give at most ${MAX_SCENE_TABLES} tables.` }),
		target: idSchema,
		obstacles: sceneObstacles,
		skyline: sceneSkyline,
		points: z.object({
			count: wholeNumber(2, 2_000),
			insetM: quantity(-5, 100, 'm'),
			forwardM: quantity(-5, 5, 'm'),
			edges: z
				.array(z.enum(edges, { error: 'Give edges as top, bottom, left, right.' }))
				.min(1, { error: 'Give at least one edge.' })
				.max(4, { error: 'Give each edge once.' })
		}),
		steps: z
			.array(
				z.object({ sun: sceneSun, poses: z.array(z.object({ azimuthDeg, tiltDeg })).max(MAX_SCENE_TABLES) })
			)
			.min(1, { error: 'Give at least one step.' })
			.max(20_000, { error: 'Give at most 20000 steps.' })
	})
	.superRefine((scene, context) => {
		refuseTwins(scene.tables, 'tables', context);
		if (!scene.tables.some((table) => table.id === scene.target)) {
			context.addIssue({ code: 'custom', path: ['target'], message: 'No table has this id.' });
		}
		if (new Set(scene.points.edges).size !== scene.points.edges.length) {
			context.addIssue({ code: 'custom', path: ['points', 'edges'], message: 'Give each edge once.' });
		}
		scene.steps.forEach((step, index) => {
			if (step.poses.length !== scene.tables.length) {
				context.addIssue({
					code: 'custom',
					path: ['steps', index, 'poses'],
					message: `Give one pose for each of the ${scene.tables.length} tables, in their order.`
				});
			}
		});
		const rays = scene.points.count * scene.points.edges.length * scene.steps.length * scene.tables.length;
		if (rays > MAX_MOUNT_RAYS * 50) {
			context.addIssue({
				code: 'custom',
				path: ['steps'],
				message: 'The scene is too large for one call: send fewer steps, points or tables.'
			});
		}
	});

const edgeString = z.string().regex(/^[01]*$/);
export const mountAnswerSchema = z.object({
	steps: z.array(
		z.object({
			top: edgeString.optional(),
			bottom: edgeString.optional(),
			left: edgeString.optional(),
			right: edgeString.optional()
		})
	)
});

const { name: _name, widthM, heightM, ...otherMechanics } = trackerModelShape;
void _name;

export const fieldLossRequestSchema = z
	.object({
		latitudeDeg,
		longitudeDeg,
		year: wholeNumber(1950, 2100),
		stepMinutes: wholeNumber(1, 20).default(10),
		refraction: z.boolean({ error: 'Give true or false.' }).default(true),
		beam: z.enum(['meinel', 'clear'], { error: 'Give the beam as "meinel" or "clear".' }).default('clear'),
		altitudeM: quantity(-450, 6500, 'm above sea level').default(0),
		model: z.object({ widthM, heightM, ...z.object(otherMechanics).partial().shape }),
		trackers: z
			.array(z.object({ id: idSchema, eastM: metres, northM: metres, upM: metres.default(0) }))
			.min(1, { error: 'Give at least one tracker.' })
			.max(MAX_FIELD_LOSS_TRACKERS, { error: `Give at most ${MAX_FIELD_LOSS_TRACKERS} trackers.` }),
		only: z
			.array(idSchema)
			.min(1, { error: 'Give at least one id, or leave this out.' })
			.max(MAX_FIELD_LOSS_TRACKERS)
			.optional(),
		points: z
			.array(z.object({ xM: metres, yM: metres }))
			.max(100, { error: 'Give at most 100 points.' })
			.optional()
	})
	.superRefine((request, context) => {
		refuseTwins(request.trackers, 'trackers', context);
		const ids = new Set(request.trackers.map((tracker) => tracker.id));
		request.only?.forEach((id, index) => {
			if (!ids.has(id)) {
				context.addIssue({ code: 'custom', path: ['only', index], message: 'No tracker has this id.' });
			}
		});
	});

export const fieldLossAnswerSchema = z.object({
	daylightH: z.number(),
	trackers: z.array(
		z.object({
			id: z.string(),
			beamLoss: z.number(),
			meanShadedShare: z.number(),
			anyShadeShareOfDaylight: z.number(),
			points: z
				.array(z.object({ xM: z.number(), yM: z.number(), shadedShareOfDaylight: z.number() }))
				.optional()
		})
	)
});

const wattsM2 = quantity(0, 2000, 'W/m²');

export const irradianceRequestSchema = z.object({
	tiltDeg: quantity(0, 180, 'degrees'),
	zenithDeg: quantity(0, 180, 'degrees'),
	angleOfIncidenceDeg: quantity(0, 180, 'degrees'),
	directNormal: wattsM2,
	diffuseHorizontal: wattsM2,
	extraterrestrialNormal: quantity(1, 2000, 'W/m²'),
	model: z.enum(['isotropic', 'hay-davies', 'perez'], {
		error: 'Give the model as "isotropic", "hay-davies" or "perez".'
	})
});

export const irradianceAnswerSchema = z.object({ skyDiffuse: z.number() });
