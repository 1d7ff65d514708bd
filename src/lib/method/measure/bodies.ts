/** Shadows of trees, walls, masts and buildings on a level plane against closed areas. */
import { fixedGroup, type Obstacle } from '../../core';
import { obstacleSolids } from '../../core/shade/obstacle-solids';
import { ShadeEngine } from '../../core/shade/engine';
import { distances, within, type Check, type Row } from '../check';

/** Side of the level plane that takes the shadows, metres. */
const PLANE_M = 400;
const at = { id: 'o', name: '', eastM: 0, northM: 0 };

/** Area that an obstacle shades on level ground, m². */
function shadowM2(obstacle: Obstacle, azimuthDeg: number, elevationDeg: number): number {
	const level = fixedGroup({ widthM: PLANE_M, heightM: PLANE_M }, { azimuthDeg: 180, tiltDeg: 0 });
	const solids = obstacleSolids(obstacle, { groundAt: () => 0, treeYears: 0, latitudeDeg: 45 }, 0);
	const one = () => new Float64Array(1);
	// A hair under the ground, so that feet stand above it.
	const up = Float64Array.of(-1e-6);
	const engine = new ShadeEngine(one(), one(), up, new Int32Array(1), [level], solids);
	engine.setSun(azimuthDeg, elevationDeg);
	return engine.share(0) * PLANE_M ** 2;
}

const rad = (degrees: number): number => (degrees * Math.PI) / 180;
const SUNS = [
	[180, 20],
	[137, 35],
	[263, 60]
] as const;

const crown = (crownShape: 'ellipsoid' | 'cylinder'): Obstacle => ({
	...{ ...at, kind: 'tree', crownShape, heightM: 12, crownBaseM: 2, crownRadiusM: 3, trunkRadiusM: 0 },
	...{ crownTransmission: 0, growthMPerYear: 0, maxHeightM: 12 }
});
const box: Obstacle = { ...at, kind: 'box', sizeXM: 8, sizeYM: 5, heightM: 6, turnDeg: 0 };
const house: Obstacle = {
	...{ ...at, kind: 'building', heightM: 6, roof: { kind: 'flat' } },
	corners: [
		[-4, -2.5],
		[4, -2.5],
		[4, 2.5],
		[-4, 2.5]
	]
};
const wall: Obstacle = {
	...{ ...at, kind: 'wall', heightM: 2, thicknessM: 0.3, transmission: 0.4 },
	line: [
		[-10, 0],
		[10, 0]
	]
};

/** Prism over a rectangle: footprint and the strips that its roof is moved by. */
const blockM2 = (x: number, y: number, h: number, azimuthDeg: number, elevationDeg: number): number => {
	const length = h / Math.tan(rad(elevationDeg));
	return x * y + length * (x * Math.abs(Math.cos(rad(azimuthDeg))) + y * Math.abs(Math.sin(rad(azimuthDeg))));
};

function* flatRows(): Generator<Row> {
	for (const [azimuthDeg, elevationDeg] of SUNS) {
		const name = `sun ${azimuthDeg}, ${elevationDeg}`;
		const block = blockM2(8, 5, 6, azimuthDeg, elevationDeg);
		yield [`box, ${name}`, shadowM2(box, azimuthDeg, elevationDeg) / block, 1];
		yield [`building, ${name}`, shadowM2(house, azimuthDeg, elevationDeg) / block, 1];
		const fence = 0.6 * blockM2(20, 0.3, 2, azimuthDeg, elevationDeg);
		yield [`fence, ${name}`, shadowM2(wall, azimuthDeg, elevationDeg) / fence, 1];
	}
}

function* roundRows(): Generator<Row> {
	for (const [azimuthDeg, elevationDeg] of SUNS) {
		const name = `sun ${azimuthDeg}, ${elevationDeg}`;
		const [sin, cos] = [Math.sin(rad(elevationDeg)), Math.cos(rad(elevationDeg))];
		// An ellipsoid of radius 3 and half height 5 square to the sun: pi r sqrt(r² sin² e + c² cos² e).
		const round = (Math.PI * 3 * Math.hypot(3 * sin, 5 * cos)) / sin;
		yield [
			`round crown, ${name}`,
			(100 * shadowM2(crown('ellipsoid'), azimuthDeg, elevationDeg)) / round,
			100
		];
		const upright = Math.PI * 9 + (6 * 10) / Math.tan(rad(elevationDeg));
		yield [
			`upright crown, ${name}`,
			(100 * shadowM2(crown('cylinder'), azimuthDeg, elevationDeg)) / upright,
			100
		];
		const mast: Obstacle = { ...at, kind: 'mast', heightM: 15, radiusM: 0.4 };
		const pole = Math.PI * 0.16 + (0.8 * 15) / Math.tan(rad(elevationDeg));
		yield [`mast, ${name}`, (100 * shadowM2(mast, azimuthDeg, elevationDeg)) / pole, 100];
	}
}

export const bodyChecks: Check[] = [
	{
		id: 'bodies-flat',
		effect: 'bodies',
		title: 'Shadow of boxes, buildings and fences on level ground, relative',
		against: 'footprint and the strips that the top is moved by',
		source: 'Plane geometry',
		provenance: 'formula',
		unit: '',
		tolerance: within(1e-6),
		measure: () => distances(flatRows())
	},
	{
		id: 'bodies-round',
		effect: 'bodies',
		title: 'Shadow of crowns and masts, sixteen-sided, relative',
		against: 'round bodies: ellipsoid and cylinder',
		source: 'Outline of an ellipsoid: π r √(r² sin² e + c² cos² e)',
		provenance: 'formula',
		unit: '%',
		tolerance: within(3, 2),
		measure: () => distances(roundRows())
	}
];
