import { expect, type APIResponse, type Page } from '@playwright/test';
import type { Layout, Plot, Tracker } from '../../../src/lib/core/document';
import { modelLibrary } from '../../../src/lib/schema/model-library';

/** An invented field for the results pages, made through the HTTP interface. */
export interface SmallField {
	projectId: string;
	layoutId: string;
}

interface FieldOptions {
	/** Rows north to south and trackers in each. */
	rows?: number;
	columns?: number;
	pitchEastWestM?: number;
	/** Rise to the east in metres per 100 m. */
	risePercent?: number;
}

async function answered<T>(response: APIResponse): Promise<T> {
	expect(response.ok(), `${response.url()} answers ${response.status()}: ${await response.text()}`).toBe(
		true
	);
	return (await response.json()) as T;
}

function trackersOf({ rows = 2, columns = 3, pitchEastWestM = 12 }: FieldOptions): Tracker[] {
	return Array.from({ length: rows * columns }, (_, i) => {
		const [row, column] = [Math.floor(i / columns), i % columns];
		return {
			id: `tracker-${i}`,
			tag: `${'ABCDEFGH'[row]}${String(column + 1).padStart(2, '0')}`,
			modelId: modelLibrary[1].id,
			eastM: column * pitchEastWestM,
			northM: -row * 11,
			axisHeightM: null,
			posture: { kind: 'following' }
		};
	});
}

/** Needs a signed-in page of somebody who may make projects. */
export async function makeSmallField(page: Page, options: FieldOptions = {}): Promise<SmallField> {
	const origin = new URL(page.url()).origin;
	const headers = { origin };
	const project = await answered<{ id: string }>(
		await page.request.post('/api/v1/projects', {
			headers,
			data: {
				name: `Results field ${Date.now() % 100_000}`,
				place: {
					latitudeDeg: 41.2,
					longitudeDeg: 14.5,
					altitudeM: 420,
					timeZone: 'Europe/Rome',
					magneticDeclinationDeg: 4
				}
			}
		})
	);
	const plot = await answered<{ document: Plot; revision: number }>(
		await page.request.get(`/api/v1/projects/${project.id}/plot`)
	);
	const document: Plot = {
		...plot.document,
		boundary: [
			{
				outer: [
					[-20, -60],
					[140, -60],
					[140, 20],
					[-20, 20]
				],
				holes: []
			}
		],
		ground: { kind: 'plane', heightM: 0, risePercent: options.risePercent ?? 9, riseTowardsDeg: 90 }
	};
	await answered(
		await page.request.put(`/api/v1/projects/${project.id}/plot`, {
			headers: { ...headers, 'if-match': `"${plot.revision}"` },
			data: { document }
		})
	);
	const layouts = await answered<{ items: { id: string; revision: number }[] }>(
		await page.request.get(`/api/v1/projects/${project.id}/layouts`)
	);
	const layout = layouts.items[0];
	const drawn: Layout = {
		version: 1,
		models: [modelLibrary[1]],
		trackers: trackersOf(options),
		mounts: { common: null, exceptions: {}, fromRunId: null }
	};
	await answered(
		await page.request.put(`/api/v1/layouts/${layout.id}`, {
			headers: { ...headers, 'if-match': `"${layout.revision}"` },
			data: { document: drawn }
		})
	);
	return { projectId: project.id, layoutId: layout.id };
}

/** The layout as it is stored. */
export async function storedLayout(page: Page, layoutId: string): Promise<Layout> {
	return (await answered<{ document: Layout }>(await page.request.get(`/api/v1/layouts/${layoutId}`)))
		.document;
}

/** Moves the first tracker in the stored layout, as another person would. */
export async function moveFirstTracker(page: Page, layoutId: string): Promise<void> {
	const stored = await answered<{ document: Layout; revision: number }>(
		await page.request.get(`/api/v1/layouts/${layoutId}`)
	);
	stored.document.trackers[0].eastM -= 3;
	await answered(
		await page.request.put(`/api/v1/layouts/${layoutId}`, {
			headers: { origin: new URL(page.url()).origin, 'if-match': `"${stored.revision}"` },
			data: { document: stored.document }
		})
	);
}
