import { isConvex, type Obstacle, type Roof, type TreeObstacle } from '$lib/core';
import { MAX_REACH_M } from '$lib/schema';
import { longestSideDeg } from './obstacle-edit';

/** One number of an obstacle as a field of its card. */
export interface NumberRow {
	key: string;
	label: string;
	unit: string;
	min: number;
	max: number;
	step: number;
	hint?: string;
	/** Takes the whole width of the card. */
	wide?: boolean;
	value: number;
	change: (value: number) => Partial<Obstacle>;
}

/** One choice of an obstacle. */
export interface ChoiceRow {
	key: string;
	label: string;
	options: { value: string; label: string; disabled?: boolean }[];
	hint?: string;
	value: string;
	change: (value: string) => Partial<Obstacle>;
}

type Range = Pick<NumberRow, 'unit' | 'min' | 'max' | 'step'>;
const metres = (min: number, max: number, step = 0.5): Range => ({ unit: 'm', min, max, step });
const degrees: Range = { unit: '°', min: 0, max: 360, step: 5 };

/** A share of the beam, shown in percent. */
function lightRow(
	key: string,
	label: string,
	hint: string,
	share: number,
	change: (share: number) => Partial<Obstacle>
): NumberRow {
	return {
		key,
		label,
		unit: '%',
		min: 0,
		max: 100,
		step: 5,
		wide: true,
		hint,
		value: Number((share * 100).toFixed(3)),
		change: (value) => change(value / 100)
	};
}

function placeRows(obstacle: Obstacle): NumberRow[] {
	const along = metres(-MAX_REACH_M, MAX_REACH_M);
	return [
		{ key: 'eastM', label: 'East', ...along, value: obstacle.eastM, change: (eastM) => ({ eastM }) },
		{ key: 'northM', label: 'North', ...along, value: obstacle.northM, change: (northM) => ({ northM }) }
	];
}

function treeRows(tree: TreeObstacle): NumberRow[] {
	const height = metres(Math.max(0.1, tree.crownBaseM + 0.1), Math.min(120, tree.maxHeightM));
	const base = metres(0, Math.max(0, tree.heightM - 0.1));
	const growth: Range = { unit: 'm/year', min: 0, max: 5, step: 0.1 };
	const sheds = tree.leafTransmission !== undefined;
	const rows: NumberRow[] = [
		{
			key: 'heightM',
			label: 'Height today',
			...height,
			value: tree.heightM,
			change: (heightM) => ({ heightM })
		},
		{ key: 'crownBaseM', label: 'Crown from', ...base, value: tree.crownBaseM, change: (crownBaseM) => ({ crownBaseM }) }, // prettier-ignore
		{ key: 'crownRadiusM', label: 'Crown radius', ...metres(0.05, 40), value: tree.crownRadiusM, change: (crownRadiusM) => ({ crownRadiusM }) }, // prettier-ignore
		{ key: 'trunkRadiusM', label: 'Trunk radius', ...metres(0, 5, 0.05), value: tree.trunkRadiusM, change: (trunkRadiusM) => ({ trunkRadiusM }) }, // prettier-ignore
		{ key: 'growthMPerYear', label: 'Growth', ...growth, value: tree.growthMPerYear, change: (growthMPerYear) => ({ growthMPerYear }) }, // prettier-ignore
		{ key: 'maxHeightM', label: 'Full-grown at', ...metres(tree.heightM, 120), value: tree.maxHeightM, change: (maxHeightM) => ({ maxHeightM }) }, // prettier-ignore
		lightRow(
			'crownTransmission',
			sheds ? 'Light through the bare crown' : 'Light through the crown',
			'0\u00a0% is opaque; a bare winter crown lets 30–60\u00a0% through (common practice).',
			tree.crownTransmission,
			(crownTransmission) => ({ crownTransmission })
		)
	];
	if (tree.leafTransmission !== undefined)
		rows.push(
			lightRow(
				'leafTransmission',
				'Light through it in leaf',
				'In leaf from mid-April to the end of October, half a year apart in the south (common practice).',
				tree.leafTransmission,
				(leafTransmission) => ({ leafTransmission })
			)
		);
	return rows;
}

/** The numbers of an obstacle, in the order of its card; ranges as in its schema, which has the last word. */
export function numberRows(obstacle: Obstacle): NumberRow[] {
	const place = placeRows(obstacle);
	switch (obstacle.kind) {
		case 'tree':
			return [...place, ...treeRows(obstacle)];
		case 'box':
			return [
				...place,
				{ key: 'sizeXM', label: 'Length', ...metres(0.01, 2000), value: obstacle.sizeXM, change: (sizeXM) => ({ sizeXM }) }, // prettier-ignore
				{ key: 'sizeYM', label: 'Width', ...metres(0.01, 2000), value: obstacle.sizeYM, change: (sizeYM) => ({ sizeYM }) }, // prettier-ignore
				{ key: 'heightM', label: 'Height', ...metres(0.01, 300), value: obstacle.heightM, change: (heightM) => ({ heightM }) }, // prettier-ignore
				{
					key: 'turnDeg',
					label: 'Turn',
					...degrees,
					min: -360,
					wide: true,
					hint: 'Clockwise; at 0 the length lies east–west.',
					value: obstacle.turnDeg,
					change: (turnDeg) => ({ turnDeg })
				}
			];
		case 'building': {
			const { roof } = obstacle;
			const set = (part: Partial<Extract<Roof, { kind: 'pitched' }>>) => ({
				roof: { ...roof, ...part } as Roof
			});
			const wall: NumberRow = {
				key: 'heightM',
				label: roof.kind === 'pitched' ? 'Height to the eaves' : 'Height',
				...metres(0.1, 300),
				wide: true,
				value: obstacle.heightM,
				change: (heightM) => ({ heightM })
			};
			if (roof.kind === 'flat') return [...place, wall];
			return [
				...place,
				wall,
				{ key: 'riseM', label: 'Ridge above eaves', ...metres(0.01, 60), value: roof.riseM, change: (riseM) => set({ riseM }) }, // prettier-ignore
				{ key: 'ridgeDeg', label: 'Ridge runs along', ...degrees, value: roof.ridgeDeg, change: (ridgeDeg) => set({ ridgeDeg }) } // prettier-ignore
			];
		}
		case 'wall':
			return [
				...place,
				{ key: 'heightM', label: 'Height', ...metres(0.01, 100, 0.1), value: obstacle.heightM, change: (heightM) => ({ heightM }) }, // prettier-ignore
				{ key: 'thicknessM', label: 'Thickness', ...metres(0.005, 20, 0.05), value: obstacle.thicknessM, change: (thicknessM) => ({ thicknessM }) }, // prettier-ignore
				lightRow(
					'transmission',
					'Light through it',
					'0\u00a0% is a wall; a wire fence lets most of it through.',
					obstacle.transmission,
					(transmission) => ({ transmission })
				)
			];
		case 'mast':
			return [
				...place,
				{ key: 'heightM', label: 'Height', ...metres(0.1, 300), value: obstacle.heightM, change: (heightM) => ({ heightM }) }, // prettier-ignore
				{ key: 'radiusM', label: 'Radius', ...metres(0.005, 20, 0.05), value: obstacle.radiusM, change: (radiusM) => ({ radiusM }) } // prettier-ignore
			];
	}
}

/** The choices of an obstacle, above its numbers. */
export function choiceRows(obstacle: Obstacle): ChoiceRow[] {
	if (obstacle.kind === 'building') {
		const inward = !isConvex(obstacle.corners);
		return [
			{
				key: 'roof',
				label: 'Roof',
				value: obstacle.roof.kind,
				hint: inward ? 'A pitched roof needs a footprint without inward corners.' : undefined,
				options: [
					{ value: 'flat', label: 'flat' },
					{ value: 'pitched', label: 'pitched', disabled: inward }
				],
				change: (kind) =>
					kind === 'pitched'
						? { roof: { kind: 'pitched', riseM: 2, ridgeDeg: longestSideDeg(obstacle.corners) } }
						: { roof: { kind: 'flat' } }
			}
		];
	}
	if (obstacle.kind !== 'tree') return [];
	return [
		{
			key: 'crownShape',
			label: 'Crown',
			value: obstacle.crownShape ?? 'cylinder',
			options: [
				{ value: 'cylinder', label: 'upright' },
				{ value: 'ellipsoid', label: 'round' },
				{ value: 'cone', label: 'pointed' }
			],
			change: (shape) => ({ crownShape: shape === 'cone' || shape === 'ellipsoid' ? shape : 'cylinder' })
		},
		{
			key: 'season',
			label: 'Leaves',
			value: obstacle.leafTransmission === undefined ? 'all-year' : 'sheds',
			options: [
				{ value: 'all-year', label: 'all year' },
				{ value: 'sheds', label: 'not in winter' }
			],
			change: (season) =>
				season === 'sheds'
					? { crownTransmission: 0.45, leafTransmission: obstacle.crownTransmission }
					: {
							crownTransmission: obstacle.leafTransmission ?? obstacle.crownTransmission,
							leafTransmission: undefined,
							leafDays: undefined
						}
		}
	];
}
