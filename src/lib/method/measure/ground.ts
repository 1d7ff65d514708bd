/** Surface of measured ground and the near skylines that it makes. */
import { groundHeightM, terrainHorizons, type Ground, type GroundPoint } from '../../core';
import { distances, within, type Check, type Row } from '../check';
import { randomSource } from './random';

const SEED = 1934;
const plane = (e: number, n: number): number => 12 + 0.08 * e - 0.05 * n;

function* planeRows(): Generator<Row> {
	const random = randomSource(SEED);
	const points = Array.from({ length: 200 }, (): GroundPoint => {
		const [e, n] = [200 * (random() - 0.5), 200 * (random() - 0.5)];
		return [e, n, plane(e, n)];
	});
	const cells = { westM: -100, southM: -100, cellM: 10, columns: 21, rows: 21 };
	const heightsM = Array.from({ length: 441 }, (_, k) =>
		plane(-100 + 10 * (k % 21), -100 + 10 * Math.floor(k / 21))
	);
	const grounds: Ground[] = [
		{ kind: 'points', points },
		{ kind: 'raster', ...cells, heightsM }
	];
	for (const ground of grounds) {
		for (let k = 0; k < 300; k++) {
			const [e, n] = [120 * (random() - 0.5), 120 * (random() - 0.5)];
			yield [`${ground.kind} at ${e.toFixed(1)}, ${n.toFixed(1)}`, groundHeightM(ground, e, n), plane(e, n)];
		}
	}
}

/** Rolling ground on a raster, and its skyline by a march along rays. */
function* skylineRows(): Generator<Row> {
	const rolling = (e: number, n: number): number => 6 * Math.sin(e / 24) * Math.cos(n / 31) + 0.03 * e;
	const columns = 31;
	const ground: Ground = {
		...{ kind: 'raster', westM: -90, southM: -90, cellM: 6, columns, rows: columns },
		heightsM: Array.from({ length: columns ** 2 }, (_, k) =>
			rolling(-90 + 6 * (k % columns), -90 + 6 * Math.floor(k / columns))
		)
	};
	const east = Float64Array.of(0, -40);
	const north = Float64Array.of(0, 25);
	const up = east.map((e, i) => groundHeightM(ground, e, north[i]) + 2);
	const horizons = terrainHorizons(ground, east, north, up);
	if (!horizons) throw new Error('A raster has near skylines');
	for (let i = 0; i < east.length; i++) {
		for (let azimuthDeg = 0; azimuthDeg < 360; azimuthDeg += 15) {
			const [s, c] = [Math.sin((azimuthDeg * Math.PI) / 180), Math.cos((azimuthDeg * Math.PI) / 180)];
			let tangent = 0;
			for (let d = 0.05; d < 200; d += 0.05) {
				const [e, n] = [east[i] + d * s, north[i] + d * c];
				if (Math.max(Math.abs(e), Math.abs(n)) > 90) break;
				tangent = Math.max(tangent, (groundHeightM(ground, e, n) - up[i]) / d);
			}
			const marched = (Math.atan(tangent) * 180) / Math.PI;
			yield [`tracker ${i}, bearing ${azimuthDeg}`, horizons.heightDeg(i, azimuthDeg), marched];
		}
	}
}

export const groundChecks: Check[] = [
	{
		id: 'ground-plane',
		effect: 'ground',
		title: 'A slope measured by 200 scattered points and by a raster comes back',
		against: `the plane itself, between the points (seed ${SEED})`,
		source: 'Triangles of Delaunay 1934; bilinear cells',
		provenance: 'formula',
		unit: 'm',
		// Points stand on a net of a millimetre, so that the triangles are the same on every machine.
		tolerance: within(1e-4),
		measure: () => distances(planeRows())
	},
	{
		id: 'ground-skyline',
		effect: 'ground',
		title: 'Near skyline of rolling ground',
		against: 'a march along rays in steps of 5 cm',
		source: 'Definition of a skyline',
		provenance: 'formula',
		unit: '°',
		tolerance: within(0.01),
		measure: () => distances(skylineRows())
	}
];
