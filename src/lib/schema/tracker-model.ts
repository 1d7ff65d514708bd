import { z } from 'zod';
import type { StopArc, TrackerModel } from '../core/document';
import { idSchema, label, quantity, wholeNumber } from './quantity';

const bearing = quantity(0, 360, 'degrees clockwise from true north');

export const stopArcSchema = z.strictObject({
	fromDeg: bearing,
	toDeg: bearing
}) satisfies z.ZodType<StopArc>;

export const trackerModelShape = {
	name: label(80, 'name'),
	widthM: quantity(0.3, 40, 'm'),
	heightM: quantity(0.3, 40, 'm'),
	frameMarginM: quantity(0, 1, 'm'),
	centreGapM: quantity(0, 3, 'm'),
	axisHeightM: quantity(0.2, 20, 'm'),
	tiltAxisOffsetM: quantity(-2, 2, 'm'),
	tableOffsetM: quantity(-2, 2, 'm'),
	centreShiftM: quantity(-5, 5, 'm'),
	minTiltDeg: quantity(0, 90, 'degrees'),
	maxTiltDeg: quantity(0, 90, 'degrees'),
	stops: stopArcSchema.nullable(),
	night: z.strictObject({ azimuthDeg: bearing.nullable(), tiltDeg: quantity(0, 90, 'degrees') }),
	windTiltDeg: quantity(0, 90, 'degrees'),
	slewDegPerS: quantity(0.005, 20, 'degrees a second'),
	tiltSlewDegPerS: quantity(0.005, 20, 'degrees a second').optional(),
	sensorHeadRadiusM: quantity(0.001, 0.5, 'm'),
	sensorViewDeg: quantity(1, 90, 'degrees'),
	sensorLeadM: quantity(0, 200, 'm'),
	moduleColumns: wholeNumber(1, 100),
	moduleRows: wholeNumber(1, 100),
	moduleOrientation: z
		.enum(['portrait', 'landscape'], { error: 'Give the modules as "portrait" or "landscape".' })
		.optional(),
	groupsPerModule: wholeNumber(1, 12).optional(),
	modulesPerString: wholeNumber(1, 10_000).optional(),
	powerW: quantity(0, 200_000, 'W')
};

/** What no single field shows: ranges the right way round, a slot narrower than the table, a table clear of the ground. */
export function checkModel(
	model: Omit<TrackerModel, 'id'>,
	add: (path: string[], message: string) => void
): void {
	if (model.maxTiltDeg <= model.minTiltDeg) {
		add(['maxTiltDeg'], 'The largest tilt must be above the smallest tilt.');
	}
	if (model.centreGapM >= model.widthM)
		add(['centreGapM'], 'The centre gap must be narrower than the table.');
	if (model.stops && model.stops.fromDeg === model.stops.toDeg) {
		add(['stops', 'toDeg'], 'The two stops must differ; choose no stops for a free turn.');
	}
	if (model.night.tiltDeg > model.maxTiltDeg) {
		add(['night', 'tiltDeg'], 'The night tilt lies beyond the largest tilt.');
	}
	const modules = model.moduleColumns * model.moduleRows;
	if (model.modulesPerString !== undefined && model.modulesPerString > modules) {
		add(['modulesPerString'], `The table has ${modules} modules: a string of it can’t hold more.`);
	}
	if (model.windTiltDeg > model.maxTiltDeg)
		add(['windTiltDeg'], 'The wind tilt lies beyond the largest tilt.');
}

export const trackerModelSchema = z
	.strictObject({ id: idSchema, ...trackerModelShape })
	.superRefine((model, context) =>
		checkModel(model, (path, message) => context.addIssue({ code: 'custom', path, message }))
	) satisfies z.ZodType<TrackerModel>;

/** A model as it comes in; the server gives it its id. */
export const newTrackerModelSchema = z
	.strictObject(trackerModelShape)
	.superRefine((model, context) =>
		checkModel(model, (path, message) => context.addIssue({ code: 'custom', path, message }))
	);
export type NewTrackerModel = z.infer<typeof newTrackerModelSchema>;
