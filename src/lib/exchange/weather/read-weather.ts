import { refusal, type Refusal } from '../read-text';
import { weatherLines } from './cells';
import type { WeatherReading } from './hours';
import { readEpwLines } from './read-epw';
import { readTmy3Lines } from './read-tmy3';

const WANTED = 'a weather file in the format EPW or TMY3';

/** Reads a weather file of either format by what stands in it; the file's name is not asked. */
export function readWeather(input: Uint8Array | string): WeatherReading | Refusal {
	const text = weatherLines(input, WANTED);
	if (!text.ok) return text;
	const [first, second] = text.lines;
	if (first?.cells[0].toUpperCase() === 'LOCATION') return readEpwLines(text.lines, text.warnings);
	if (second && /^date/i.test(second.cells[0])) return readTmy3Lines(text.lines, text.warnings);
	return refusal(
		'wrong-type',
		'The file is neither EPW (its first row begins with LOCATION) nor TMY3 (its second row begins with Date).',
		`Choose ${WANTED}, as it was downloaded.`
	);
}
