import { describe, expect, it } from 'vitest';
import { fieldErrors } from '$lib/schema';
import { projectFormSchema } from './project-form';

const good = {
	name: '  Hill farm ',
	coordinates: '41°12′ N 14°30′ E',
	altitude: '300+12',
	timeZone: 'Europe/Rome',
	declination: '3,5',
	ruleKind: 'clear-above',
	ruleElevation: '12'
};
const refused = (change: Record<string, string>) => {
	const read = projectFormSchema.safeParse({ ...good, ...change });
	return read.success
		? {}
		: Object.fromEntries(fieldErrors(read.error).map(({ path, message }) => [path, message]));
};

describe('the form of a project', () => {
	it('reads what people type', () => {
		expect(projectFormSchema.parse(good)).toEqual({
			name: 'Hill farm',
			place: {
				latitudeDeg: 41.2,
				longitudeDeg: 14.5,
				altitudeM: 312,
				magneticDeclinationDeg: 3.5,
				timeZone: 'Europe/Rome'
			},
			winterRule: { kind: 'clear-above', elevationDeg: 12 }
		});
	});

	it('takes altitude and declination as nought and leaves the time zone to be found when they are empty', () => {
		const { place } = projectFormSchema.parse({ ...good, altitude: '', declination: '', timeZone: '' });
		expect(place).toEqual({ latitudeDeg: 41.2, longitudeDeg: 14.5, altitudeM: 0, magneticDeclinationDeg: 0 });
	});

	it('reads a window of solar hours', () => {
		const form = { ...good, ruleKind: 'clear-window', ruleFrom: '9', ruleTo: '15' };
		expect(projectFormSchema.parse(form).winterRule).toEqual({
			kind: 'clear-window',
			fromSolarHour: 9,
			toSolarHour: 15
		});
	});

	it.each([
		['name', { name: ' ' }, 'Give a name'],
		['coordinates', { coordinates: '141, 14' }, 'Latitude comes first'],
		['altitude', { altitude: '9000' }, '6500 m'],
		['altitude', { altitude: 'high' }, 'not a number'],
		['timeZone', { timeZone: 'Europe/Nowhere' }, 'choose one from the list'],
		['ruleElevation', { ruleElevation: '' }, 'Write a number'],
		['ruleTo', { ruleKind: 'clear-window', ruleFrom: '15', ruleTo: '9' }, 'later solar hour']
	])('names the field %s and its remedy', (field, change, words) => {
		expect(refused(change)[field]).toContain(words);
	});

	it('names every field that is wrong at once', () => {
		expect(Object.keys(refused({ name: '', coordinates: 'x', altitude: 'y' })).sort()).toEqual([
			'altitude',
			'coordinates',
			'name'
		]);
	});
});
