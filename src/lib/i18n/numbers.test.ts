import { describe, expect, it } from 'vitest';
import {
	fineWindName,
	formatArea,
	formatBearing,
	formatCoordinates,
	formatMetres,
	formatMinutes,
	formatNumber,
	formatPercent,
	windName
} from './numbers';

const plain = (text: string) => text.replaceAll('\u00a0', ' ');

describe('numbers in words and figures', () => {
	it('group thousands from five digits on and carry a true minus', () => {
		expect(plain(formatNumber(1234.5, 1))).toBe('1234.5');
		expect(plain(formatNumber(1234567.891, 2))).toBe('1 234 567.89');
		expect(formatNumber(-0.25, 2)).toBe('\u22120.25');
	});

	it('never show a minus zero or a NaN', () => {
		expect(formatNumber(-0.001, 2)).toBe('0.00');
		expect(formatNumber(Number.NaN, 2)).toBe('–');
	});

	it('carry their units', () => {
		expect(plain(formatMetres(2.6))).toBe('2.60 m');
		expect(plain(formatPercent(0.0684))).toBe('6.8 %');
		expect(plain(formatArea(9999))).toBe('9999 m²');
		expect(plain(formatArea(12345))).toBe('1.23 ha');
		expect(plain(formatMinutes(185))).toBe('3 h 05 min');
	});

	it('write bearings with three digits and wrap at 360', () => {
		expect(formatBearing(7)).toBe('007°');
		expect(formatBearing(-1)).toBe('359°');
		expect(formatBearing(359.7)).toBe('000°');
		expect(formatBearing(7.25, 1)).toBe('007.3°');
		expect(windName(350)).toBe('north');
		expect(windName(133)).toBe('south-east');
		// The compass card: each of the sixteen winds holds 22.5 degrees about its own bearing.
		expect(fineWindName(20)).toBe('north-north-east');
		expect(fineWindName(11)).toBe('north');
		expect(fineWindName(349)).toBe('north');
		expect(fineWindName(-90)).toBe('west');
		expect(fineWindName(236.3)).toBe('west-south-west');
	});

	it('write coordinates with letters', () => {
		expect(plain(formatCoordinates(-33.45, 14.5))).toBe('33.4500° S, 14.5000° E');
	});
});
