import { Body, Equator, Horizon, Observer } from 'astronomy-engine';
import { arcDeg, sunPosition } from '../../core';
import { positionFromPlace } from '../../core/sun/position';
import { SunSeries } from '../../core/sun/series';
import { distances, within, type Check, type Extent, type Row } from '../check';

const LATITUDES = [68, 45, 40, 0, -23.4, -35];
const LONGITUDE = 8;
const STEP_MS = 600000;

/**
 * Daylight of a year by tens of minutes, every `stride`-th of them. The stride has no common part with the 144 steps of
 * a day, so that all hours are met.
 */
function* daylight(latitudeDeg: number, stride: number): Generator<number> {
	const end = Date.UTC(2026, 0, 1);
	for (let ms = Date.UTC(2025, 0, 1) + STEP_MS / 2; ms < end; ms += STEP_MS * stride) {
		if (sunPosition(ms, latitudeDeg, LONGITUDE).elevationDeg > 0) yield ms;
	}
}

function* rows(stride: number, refraction: 'normal' | null): Generator<Row> {
	for (const latitudeDeg of LATITUDES) {
		const observer = new Observer(latitudeDeg, LONGITUDE, 0);
		for (const ms of daylight(latitudeDeg, stride)) {
			const when = new Date(ms);
			const { ra, dec } = Equator(Body.Sun, when, observer, true, true);
			const { azimuth, altitude } = Horizon(when, observer, ra, dec, refraction ?? undefined);
			const sun = sunPosition(ms, latitudeDeg, LONGITUDE);
			const elevationDeg = refraction ? sun.apparentElevationDeg : sun.elevationDeg;
			const off = arcDeg(
				{ azimuthDeg: sun.azimuthDeg, elevationDeg },
				{ azimuthDeg: azimuth, elevationDeg: altitude }
			);
			yield [`${latitudeDeg}°, ${when.toISOString().slice(0, 16)}`, off, 0];
		}
	}
}

/** Positions read between hourly nodes, as year runs do, against the sums themselves. */
function* seriesRows(stride: number): Generator<Row> {
	const series = new SunSeries();
	for (const ms of daylight(45, stride)) {
		const sun = positionFromPlace(series.placeAt(ms), 45, LONGITUDE);
		yield [new Date(ms).toISOString().slice(0, 16), arcDeg(sun, sunPosition(ms, 45, LONGITUDE)), 0];
	}
}

const stride = (extent: Extent): number => (extent === 'whole' ? 5 : 61);

export const sunLibraryChecks: Check[] = [
	{
		id: 'sun-year-six-latitudes',
		effect: 'sun',
		title: 'All daylight of 2025 at 68, 45, 40, 0, -23.4 and -35 degrees',
		against: 'astronomy-engine, all hours of the day met',
		source: 'astronomy-engine 2.1.19',
		provenance: 'library',
		unit: '°',
		tolerance: within(0.001),
		measure: (extent) => distances(rows(stride(extent), null))
	},
	{
		id: 'sun-year-six-latitudes-apparent',
		effect: 'sun',
		title: 'The same through the air',
		against: 'astronomy-engine with its own refraction',
		source: 'astronomy-engine 2.1.19',
		provenance: 'library',
		unit: '°',
		tolerance: within(0.001),
		measure: (extent) => distances(rows(stride(extent), 'normal'))
	},
	{
		id: 'sun-series',
		effect: 'sun',
		title: 'Reading the sun between hourly nodes, as year runs do',
		against: "the core's own full sums",
		source: 'This project',
		provenance: 'formula',
		unit: '°',
		tolerance: within(0.0001, 0.00003),
		measure: (extent) => distances(seriesRows(extent === 'whole' ? 1 : 7))
	}
];
