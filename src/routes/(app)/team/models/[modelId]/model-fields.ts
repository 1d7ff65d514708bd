import type { TrackerModel } from '$lib/core';

/** Fields of a model that are one number each, always there or optional. */
export type ModelNumber = {
	[Key in keyof Required<TrackerModel>]: Required<TrackerModel>[Key] extends number ? Key : never;
}[keyof TrackerModel];

interface ModelField {
	key: ModelNumber;
	label: string;
	unit: string;
	min: number;
	max: number;
	step: number;
	hint?: string;
	/** May be left empty. */
	optional?: boolean;
}

/** The form of a tracker model; ranges as in its schema, which has the last word. */
export const groups: { title: string; note: string; fields: ModelField[] }[] = [
	{
		title: 'Table',
		note: 'the moving rectangle of modules',
		fields: [
			{
				key: 'widthM',
				label: 'Width of the glass',
				unit: 'm',
				min: 0.3,
				max: 40,
				step: 0.1,
				hint: 'Along the level axis.'
			},
			{
				key: 'heightM',
				label: 'Height of the glass',
				unit: 'm',
				min: 0.3,
				max: 40,
				step: 0.1,
				hint: 'Up the slope.'
			},
			{
				key: 'frameMarginM',
				label: 'Frame margin',
				unit: 'm',
				min: 0,
				max: 1,
				step: 0.01,
				hint: 'Steel beyond the glass on every side.'
			},
			{
				key: 'centreGapM',
				label: 'Centre gap',
				unit: 'm',
				min: 0,
				max: 3,
				step: 0.05,
				hint: 'Clear slot between left and right half, in the width; 0 is none.'
			},
			{ key: 'moduleColumns', label: 'Module columns', unit: '', min: 1, max: 100, step: 1 },
			{ key: 'moduleRows', label: 'Module rows', unit: '', min: 1, max: 100, step: 1 },
			{
				key: 'powerW',
				label: 'Power',
				unit: 'W',
				min: 0,
				max: 200_000,
				step: 100,
				hint: 'Of the whole table; kW may be typed.'
			}
		]
	},
	{
		title: 'Modules',
		note: 'how the cells are grouped, for the loss by shade',
		fields: [
			{
				key: 'groupsPerModule',
				label: 'Protected groups in a module',
				unit: '',
				min: 1,
				max: 12,
				step: 1,
				optional: true,
				hint: 'Cell groups with a bypass of their own; empty is 3.'
			},
			{
				key: 'modulesPerString',
				label: 'Modules in a string',
				unit: '',
				min: 1,
				max: 10_000,
				step: 1,
				optional: true,
				hint: 'In series; empty is the whole table.'
			}
		]
	},
	{
		title: 'Axes',
		note: 'where the table turns',
		fields: [
			{
				key: 'axisHeightM',
				label: 'Height of the tilt axis',
				unit: 'm',
				min: 0.2,
				max: 20,
				step: 0.05,
				hint: 'Above ground.'
			},
			{
				key: 'tiltAxisOffsetM',
				label: 'Tilt axis ahead of the post',
				unit: 'm',
				min: -2,
				max: 2,
				step: 0.01,
				hint: 'Towards the facing direction.'
			},
			{
				key: 'tableOffsetM',
				label: 'Table ahead of the tilt axis',
				unit: 'm',
				min: -2,
				max: 2,
				step: 0.01,
				hint: 'Along the table’s normal.'
			},
			{
				key: 'centreShiftM',
				label: 'Table centre up the slope',
				unit: 'm',
				min: -5,
				max: 5,
				step: 0.01,
				hint: 'From the tilt axis; 0 when it is held in its middle.'
			}
		]
	},
	{
		title: 'Drive',
		note: 'how far and how fast',
		fields: [
			{
				key: 'minTiltDeg',
				label: 'Smallest tilt',
				unit: '°',
				min: 0,
				max: 90,
				step: 1,
				hint: '0 lies flat.'
			},
			{
				key: 'maxTiltDeg',
				label: 'Largest tilt',
				unit: '°',
				min: 0,
				max: 90,
				step: 1,
				hint: '90 stands upright.'
			},
			{ key: 'slewDegPerS', label: 'Speed', unit: '°/s', min: 0.005, max: 20, step: 0.05 },
			{
				key: 'tiltSlewDegPerS',
				label: 'Speed of tilting',
				unit: '°/s',
				min: 0.005,
				max: 20,
				step: 0.05,
				optional: true,
				hint: 'Empty when it tilts as fast as it turns.'
			}
		]
	},
	{
		title: 'Sensor',
		note: 'the head that steers it',
		fields: [
			{ key: 'sensorHeadRadiusM', label: 'Radius of the head', unit: 'm', min: 0.001, max: 0.5, step: 0.005 },
			{
				key: 'sensorViewDeg',
				label: 'Half-angle of its view',
				unit: '°',
				min: 1,
				max: 90,
				step: 1,
				hint: 'Off its own axis.'
			},
			{ key: 'sensorLeadM', label: 'Length of its lead', unit: 'm', min: 0, max: 200, step: 0.5 }
		]
	}
];

/** Numbers that a model may leave out. */
type OptionalNumber = 'tiltSlewDegPerS' | 'groupsPerModule' | 'modulesPerString';

export const isOptional = (key: ModelNumber): key is OptionalNumber =>
	key === 'tiltSlewDegPerS' || key === 'groupsPerModule' || key === 'modulesPerString';

export const moduleOrientations = [
	{ value: '', label: 'as their shape says' },
	{ value: 'landscape', label: 'long side level (landscape)' },
	{ value: 'portrait', label: 'long side up the slope (portrait)' }
];
