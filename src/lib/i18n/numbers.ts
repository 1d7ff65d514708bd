/** No-break space: between a number and its unit, and between groups of thousands (SI brochure, 9th ed., 5.4.3 and 5.4.4). */
export const NBSP = '\u00a0';
const MINUS = '\u2212';

/** Digits with a decimal point, a true minus sign, and no-break spaces between thousands from 10 000 on. */
export function formatNumber(value: number, digits = 0): string {
	if (!Number.isFinite(value)) return '–';
	const [whole, fraction] = Math.abs(value).toFixed(digits).split('.');
	const grouped = whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/g, NBSP) : whole;
	const body = fraction ? `${grouped}.${fraction}` : grouped;
	return value < 0 && /[1-9]/.test(body) ? MINUS + body : body;
}

export function formatQuantity(value: number, unit: string, digits = 0): string {
	const joined = unit === '°' || unit === '' ? '' : NBSP;
	return formatNumber(value, digits) + joined + unit;
}

/** Metres, to the centimetre unless told otherwise. */
export function formatMetres(valueM: number, digits = 2): string {
	return formatQuantity(valueM, 'm', digits);
}

/** A share 0..1 as a percentage. */
export function formatPercent(share: number, digits = 1): string {
	return formatQuantity(share * 100, '%', digits);
}

export function formatDegrees(valueDeg: number, digits = 1): string {
	return formatQuantity(valueDeg, '°', digits);
}

/** Square metres below one hectare, hectares from there on. */
export function formatArea(areaM2: number): string {
	return Math.abs(areaM2) < 10_000
		? formatQuantity(areaM2, 'm²', 0)
		: formatQuantity(areaM2 / 10_000, 'ha', 2);
}

/** Hours and minutes of a span of time, for example `3 h 05 min`. */
export function formatMinutes(minutes: number): string {
	const whole = Math.round(minutes);
	if (whole < 60) return formatQuantity(whole, 'min');
	return `${Math.floor(whole / 60)}${NBSP}h${NBSP}${String(whole % 60).padStart(2, '0')}${NBSP}min`;
}

const windNames = ['north', 'north-east', 'east', 'south-east', 'south', 'south-west', 'west', 'north-west'];

/** The nearest of the eight winds of a bearing clockwise from true north. */
export function windName(bearingDeg: number): string {
	return windNames[Math.round((((bearingDeg % 360) + 360) % 360) / 45) % 8];
}

const sixteenWinds = [
	'north',
	'north-north-east',
	'north-east',
	'east-north-east',
	'east',
	'east-south-east',
	'south-east',
	'south-south-east',
	'south',
	'south-south-west',
	'south-west',
	'west-south-west',
	'west',
	'west-north-west',
	'north-west',
	'north-north-west'
];

/** The nearest of the sixteen winds of a bearing clockwise from true north. */
export function fineWindName(bearingDeg: number): string {
	return sixteenWinds[Math.round((((bearingDeg % 360) + 360) % 360) / 22.5) % 16];
}

/** A bearing clockwise from true north as three whole digits, `007°`, or with decimals, `007.5°`. */
export function formatBearing(bearingDeg: number, digits = 0): string {
	if (!Number.isFinite(bearingDeg)) return '–';
	const turned = ((bearingDeg % 360) + 360) % 360;
	const text = turned.toFixed(digits);
	const held = Number(text) >= 360 ? (0).toFixed(digits) : text;
	return `${held.padStart(digits ? 4 + digits : 3, '0')}°`;
}

/** Latitude and longitude in decimal degrees with letters, `41.2000° N, 14.5000° E`. */
export function formatCoordinates(latitudeDeg: number, longitudeDeg: number, digits = 4): string {
	const one = (value: number, positive: string, negative: string) =>
		`${Math.abs(value).toFixed(digits)}°${NBSP}${value < 0 ? negative : positive}`;
	return `${one(latitudeDeg, 'N', 'S')}, ${one(longitudeDeg, 'E', 'W')}`;
}
