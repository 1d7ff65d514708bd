/** Readers of weather files, closure and two-axis gain: the real file of Golden and two invented ones. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gunzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { trackingGain, weatherClosure, weatherSums, type GainOptions } from '../../src/lib/core';
import { readEpw, readTmy3, readWeather, type WeatherReading } from '../../src/lib/exchange/weather';

const fixture = (name: string) => readFileSync(join(import.meta.dirname, '../fixtures/weather', name));
const epwBytes = fixture('invented.epw');
const tmyBytes = fixture('invented-tmy3.csv');
const goldenBytes = gunzipSync(fixture('golden-tmy3.csv.gz'));

function taken(reading: ReturnType<typeof readWeather>): WeatherReading {
	if (!reading.ok) throw new Error(`${reading.message} ${reading.remedy}`);
	return reading;
}

describe('the real year of Golden (public TMY3 data of the US government)', () => {
	const golden = taken(readWeather(goldenBytes));
	const sums = weatherSums(golden);

	it('is read as it stands', () => {
		expect(golden).toMatchObject({
			format: 'TMY3',
			utcOffsetHours: -7,
			wholeYear: true,
			warnings: [],
			place: {
				name: 'DENVER/CENTENNIAL [GOLDEN - NREL], CO',
				latitudeDeg: 39.742,
				longitudeDeg: -105.179,
				altitudeM: 1829
			}
		});
		expect(golden.rows).toHaveLength(8760);
		// 1:00 on 1 January ends at 8:00 UTC.
		expect(golden.rows[0].startMs).toBe(Date.UTC(1999, 0, 1, 7));
		expect(golden.rows[0]).toMatchObject({ ghi: 0, tempC: -3, windMs: 0 });
		// 24:00:00 on 31 December, 1996.
		expect(golden.rows[8759]).toMatchObject({ startMs: Date.UTC(1997, 0, 1, 6), tempC: 4, windMs: 6.2 });
	});

	it('has its greatest hours and means', () => {
		expect(sums).toMatchObject({ mostGhi: 1032, mostDni: 1031, missingHours: 0 });
		// Taken from the file independently of this project, printed to 0.01.
		expect(Math.abs((sums.meanTempC ?? Number.NaN) - 9.76)).toBeLessThan(0.005);
		expect(Math.abs((sums.meanWindMs ?? Number.NaN) - 3.96)).toBeLessThan(0.005);
	});

	it('closes better with refraction and every month in its own year', () => {
		const closure = weatherClosure(golden)!;
		expect(closure.hours).toBe(3881);
		expect(Math.abs(closure.meanWm2)).toBeLessThan(0.12);
		expect(closure.rmsWm2).toBeLessThan(0.5);
		expect(closure.maxWm2).toBeLessThan(2.2);
		expect(weatherClosure(golden, 0, true)!.rmsWm2).toBeGreaterThan(closure.rmsWm2);
	});

	it('an hour read from its wrong end shows at once', () => {
		for (const shift of [-1, -0.5, 0.5, 1]) {
			expect(weatherClosure(golden, shift)!.rmsWm2).toBeGreaterThan(15);
		}
	});

	// Figures of the same file from the formulas, albedo 0.2.
	it.each([
		['isotropic', 33, 0.297, 0.477],
		['hay-davies', 35, 0.35, 0.579]
	] as const)('two axes over fixed, %s', (model, tilt, overFixed, overHorizontal) => {
		const options: GainOptions = { model, albedo: 0.2 };
		const gain = trackingGain(golden, options);
		expect(Math.abs(gain.fixedTiltDeg - tilt)).toBeLessThanOrEqual(1);
		expect(gain.fixedAzimuthDeg).toBe(180);
		// Gains in points of a hundred: half a point.
		expect(Math.abs(gain.overFixed! - overFixed)).toBeLessThan(0.005);
		expect(Math.abs(gain.overHorizontal! - overHorizontal)).toBeLessThan(0.005);
	});

	it('the best tilt beats its neighbours, and a given tilt is kept', () => {
		const at = (fixedTiltDeg?: number) => trackingGain(golden, { model: 'perez', albedo: 0.2, fixedTiltDeg });
		const best = at();
		expect(at(best.fixedTiltDeg - 1).fixedKwhM2).toBeLessThanOrEqual(best.fixedKwhM2);
		expect(at(best.fixedTiltDeg + 1).fixedKwhM2).toBeLessThanOrEqual(best.fixedKwhM2);
		expect(at(10).fixedTiltDeg).toBe(10);
	});
});

describe('EPW (invented file)', () => {
	const epw = taken(readWeather(epwBytes));

	it('reads head, hours and missing marks', () => {
		expect(epw).toMatchObject({
			format: 'EPW',
			utcOffsetHours: 2,
			wholeYear: false,
			place: { name: 'Invented Ridge', latitudeDeg: -33.4, longitudeDeg: 21.7, altitudeM: 412 }
		});
		expect(epw.rows).toHaveLength(240);
		// Hour 1 begins at midnight UTC+2.
		expect(epw.rows[0].startMs).toBe(Date.UTC(2014, 11, 31, 22));
		expect(epw.rows[30].tempC).toBeNull();
		expect(epw.rows[31].windMs).toBeNull();
		expect(epw.rows[36]).toMatchObject({ ghi: null, dni: null, dhi: null });
		expect(epw.rows[60].dni).toBeNull();
		expect(epw.rows[60].ghi).not.toBeNull();
		expect(epw.rows[84].ghi).toBeNull();
		expect(epw.warnings.join(' ')).toMatch(/240 hours.*3 hours lack/s);
	});

	it('closes, though the sun of the numbers came from another formula', () => {
		expect(weatherClosure(epw)!.rmsWm2).toBeLessThan(2);
		expect(weatherClosure(epw, 1)!.rmsWm2).toBeGreaterThan(30);
	});

	it('faces the fixed plane north in the south', () => {
		const gain = trackingGain(epw, { model: 'hay-davies', albedo: 0.2 });
		expect(gain.fixedAzimuthDeg).toBe(0);
		expect(gain.missingHours).toBe(3);
		expect(gain.twoAxisKwhM2).toBeGreaterThan(gain.fixedKwhM2);
	});

	const text = epwBytes.toString('utf8');
	const changed = (line: number, column: number, cell: string) => {
		const lines = text.split('\r\n');
		const cells = lines[line - 1].split(',');
		cells[column - 1] = cell;
		lines[line - 1] = cells.join(',');
		return readEpw(lines.join('\r\n'));
	};

	it.each([
		[9 + 11, 14, 'abc', /Row 20, column 14 \(global horizontal, Wh\/m²\) is "abc"/],
		[9 + 11, 15, '-200', /Row 20, column 15 .* -200; it must lie from -20 to 2000/],
		[9 + 11, 7, '88', /Row 20, column 7 \(dry bulb, °C\)/],
		[9 + 11, 4, '0', /Row 20, column 4 \(hour\) is "0"; it must be a whole number from 1 to 24/],
		[9 + 11, 4, '14', /Row 20 is the hour that ends on 1 January, 14:00; 1 January, 12:00 should follow/],
		[9 + 11, 3, '32', /Row 20, column 3 \(day\)/],
		[1, 7, '95', /Row 1, column 7 \(latitude\) is "95"/],
		[1, 9, '', /Row 1, column 9 \(time zone\) is ""/],
		[8, 3, '4', /Row 8, column 3 \(records an hour\) is "4"; only 1 is read/]
	] as const)('row %d, column %d as "%s" is refused by name', (line, column, cell, message) => {
		const answer = changed(line, column, cell);
		expect(answer).toMatchObject({ ok: false, message: expect.stringMatching(message) });
		expect(answer.ok === false && answer.remedy).toBeTruthy();
	});

	it('an empty value is missing, and 24 hours may end a typical February of 28 days', () => {
		const blank = taken(changed(20, 14, ''));
		expect(blank.rows[11].ghi).toBeNull();
		const head = text.split('\r\n').slice(0, 8);
		const row = (date: string) => `${date},60,?9,10,5,50,96500,0,0,300,0,0,0,0,0,0,0,0,1`;
		const leap = (dates: string[]) => readEpw([...head, ...dates.map(row)].join('\n'));
		expect(leap(['2000,2,28,24', '2003,3,1,1']).ok).toBe(true);
		expect(leap(['2000,2,28,24', '2000,2,29,1']).ok).toBe(true);
		expect(leap(['2003,2,27,24', '2003,3,1,1']).ok).toBe(false);
	});

	it('a city with a comma and letters of old Windows are read', () => {
		const city = text.replace('Invented Ridge', 'Peña, Invented');
		const reading = taken(readEpw(Buffer.from(city, 'latin1')));
		expect(reading.place).toMatchObject({ name: 'Peña, Invented', longitudeDeg: 21.7, altitudeM: 412 });
		expect(reading.warnings[0]).toMatch(/Windows-1252/);
	});
});

describe('TMY3 (invented file)', () => {
	const tmy = taken(readWeather(tmyBytes));

	it('reads the quoted name, two years, both ways of a date, the odd last hour and missing marks', () => {
		expect(tmy.place).toEqual({
			name: 'INVENTED MESA, EXAMPLE [NO STATION], XX',
			latitudeDeg: 38.5,
			longitudeDeg: -104.25,
			altitudeM: 1650
		});
		expect(tmy.rows).toHaveLength(240);
		expect(tmy.rows[0].startMs).toBe(Date.UTC(1999, 0, 27, 7));
		expect(tmy.rows[119].startMs).toBe(Date.UTC(1999, 1, 1, 6));
		expect(tmy.rows[120].startMs).toBe(Date.UTC(2001, 1, 1, 7));
		expect(tmy.rows[20].tempC).toBeNull();
		expect(tmy.rows[21].windMs).toBeNull();
		expect(tmy.rows[36].dni).toBeNull();
		expect(tmy.rows[60].ghi).toBeNull();
		expect(tmy.rows[2].ghi).toBe(0);
		expect(tmy.warnings.join(' ')).toMatch(/2 hours lack.*10 irradiances a little below zero/s);
	});

	it('closes', () => {
		expect(weatherClosure(tmy)!.rmsWm2).toBeLessThan(2);
		expect(weatherClosure(tmy, -1)!.rmsWm2).toBeGreaterThan(30);
	});

	const text = tmyBytes.toString('utf8');
	it('midnight written 0:00 of the new day is the same hour, and is told', () => {
		const moved = text
			.split('\n')
			.map((line) =>
				line.replace(/^(\d+)\/(\d+)\/(\d+),24:00:00/, (_, m: string, d: string, y: string) => {
					const next = new Date(Date.UTC(Number(y), Number(m) - 1, Number(d) + 1));
					return `${next.getUTCMonth() + 1}/${next.getUTCDate()}/${next.getUTCFullYear()},0:00`;
				})
			)
			.join('\n');
		const reading = taken(readTmy3(moved));
		expect(reading.rows).toEqual(tmy.rows);
		expect(reading.warnings.join(' ')).toMatch(/0:00 of the new day/);
	});

	it.each([
		[/^01\/27\/1999,05:00/m, '13/27/1999,05:00', /Row 7, column 1 \(date\) is "13\/27\/1999"/],
		[/^01\/27\/1999,05:00/m, '01/27/1999,05:30', /Row 7, column 2 \(time\) is "05:30"/],
		[/^01\/27\/1999,05:00/m, '01/27/1999,04:00', /Row 7 is the hour that ends on 27 January, 4:00/],
		[/^01\/27\/1999,05:00,0,0,0/m, '01/27/1999,05:00,0,0,x', /Row 7, column 5 \(GHI, Wh\/m²\) is "x"/],
		[/DNI \(W\/m\^2\)/, 'Beam', /Row 2 names no column DNI/],
		[/,-7,38\.500/, ',-7,N38.5', /Row 1, column 5 \(latitude\) is "N38.5"/]
	] as const)('%s as "%s" is refused by name', (pattern, put, message) => {
		const answer = readTmy3(text.replace(pattern, put));
		expect(answer).toMatchObject({ ok: false, message: expect.stringMatching(message) });
	});
});

describe('what is no weather file', () => {
	it.each([
		['', /empty/],
		['a,b\n1,2', /neither EPW .* nor TMY3/],
		['LOCATION;Here;;;;;45;7;1;200\n', /semicolons or tabs/],
		['LOCATION,Here,,,,,45,7,1,200\nDATA PERIODS,1,1\n', /No row of hours/]
	])('%j is refused', (text, message) => {
		expect(readWeather(text)).toMatchObject({ ok: false, message: expect.stringMatching(message) });
	});

	it('an archive and a huge file are refused by what they are', () => {
		expect(readWeather(new Uint8Array([0x1f, 0x8b, 8, 0]))).toMatchObject({
			ok: false,
			message: expect.stringMatching(/gzip/)
		});
		expect(readWeather(new Uint8Array(5_000_001))).toMatchObject({ ok: false, problem: 'too-large' });
	});
});
