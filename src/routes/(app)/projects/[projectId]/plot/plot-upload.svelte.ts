import type { BoundaryPart, Place } from '$lib/core';
import {
	readBoundary,
	readKind,
	readSkyline,
	refuseLargeFile,
	summariseBoundary,
	type BoundaryReading,
	type Refusal,
	type SkylineReading
} from '$lib/exchange';
import { boundaryProblem } from '$lib/editor/plot-panels/boundary-edit';
import type { ProjectStore } from '$lib/editor/project-store.svelte';

export type FileKind = 'boundary' | 'skyline';

type Looked =
	| { kind: 'boundary'; fileName: string; reading: BoundaryReading }
	| { kind: 'skyline'; fileName: string; reading: SkylineReading }
	| { kind: 'refused'; wanted: FileKind; fileName: string; refusal: Refusal; canSwap: boolean };

/** Samples that are drawn round the place below, so that they suit any project when they are read against it. */
const SAMPLE_PLACE = { latitudeDeg: 41.2, longitudeDeg: 14.5 };

/**
 * A file between being chosen and being taken: read, shown, asked about. The plot changes on `accept()` and not before; a refused
 * file changes nothing.
 */
export class PlotUpload {
	looked = $state.raw<Looked | null>(null);
	/** Which areas of the file are wanted. */
	chosen = $state<boolean[]>([]);
	/** The person said yes to the question about the file. */
	agreed = $state(false);
	busy = $state(false);

	#store: ProjectStore;
	#bytes: Uint8Array | null = null;
	#place: Pick<Place, 'latitudeDeg' | 'longitudeDeg'>;

	readonly parts = $derived.by((): { part: BoundaryPart; chosen: boolean }[] =>
		this.looked?.kind === 'boundary'
			? this.looked.reading.choices.map((choice, index) => ({
					part: choice.part,
					chosen: this.chosen[index] ?? false
				}))
			: []
	);
	readonly chosenParts = $derived(this.parts.filter(({ chosen }) => chosen).map(({ part }) => part));
	readonly summary = $derived(this.chosenParts.length > 0 ? summariseBoundary(this.chosenParts) : null);
	/** What still stands in the way of taking the file, or null. */
	readonly blocked = $derived.by((): string | null => {
		if (this.looked?.kind !== 'boundary') return null;
		if (this.chosenParts.length === 0) return 'Choose at least one area.';
		if (this.looked.reading.question && !this.agreed) return 'Answer the question about the place first.';
		return boundaryProblem(this.chosenParts);
	});

	constructor(store: ProjectStore) {
		this.#store = store;
		this.#place = store.project.place;
	}

	/** Reads a chosen or dropped file; what it is, is told by what stands in it. */
	async take(file: File, wanted: FileKind | null): Promise<void> {
		const asked = wanted ?? 'boundary';
		this.#place = this.#store.project.place;
		const large = refuseLargeFile(file.size);
		if (large) {
			this.#refuse(asked, file.name, large, false);
			return;
		}
		this.busy = true;
		try {
			this.#bytes = new Uint8Array(await file.arrayBuffer());
		} catch (error) {
			this.#bytes = null;
			this.#refuse(asked, file.name, unreadable(error), false);
			return;
		} finally {
			this.busy = false;
		}
		const found = readKind(this.#bytes, file.name, wanted);
		if (found.ok) this.#read(found.kind, file.name, false);
		else this.#refuse(asked, file.name, found, false);
	}

	async takeSample(kind: FileKind): Promise<void> {
		const name = kind === 'boundary' ? 'invented-boundary.geojson' : 'invented-skyline.csv';
		this.busy = true;
		try {
			const response = await fetch(`/samples/${name}`);
			if (!response.ok) throw new Error(`The server answered ${response.status}.`);
			this.#bytes = new Uint8Array(await response.arrayBuffer());
		} catch (error) {
			this.#bytes = null;
			this.#refuse(kind, name, unreadable(error), false);
			return;
		} finally {
			this.busy = false;
		}
		this.#place = SAMPLE_PLACE;
		this.#read(kind, name, false);
	}

	/** Reads the same file again with the two numbers of each pair exchanged, or as they stand. */
	readSwapped(swap: boolean): void {
		if (this.looked) this.#read('boundary', this.looked.fileName, swap);
	}

	#read(kind: FileKind, fileName: string, swap: boolean): void {
		const bytes = this.#bytes;
		if (!bytes) return;
		this.agreed = false;
		if (kind === 'skyline') {
			const reading = readSkyline(bytes);
			if (reading.ok) this.looked = { kind, fileName, reading };
			else this.#refuse(kind, fileName, reading, false);
			return;
		}
		const reading = readBoundary(bytes, fileName, this.#place, { swap });
		if (!reading.ok) {
			this.#refuse(kind, fileName, reading, reading.canSwap);
			return;
		}
		this.chosen = reading.choices.map(() => true);
		this.looked = { kind, fileName, reading };
	}

	#refuse(wanted: FileKind, fileName: string, refusal: Refusal, canSwap: boolean): void {
		this.looked = { kind: 'refused', wanted, fileName, refusal, canSwap };
	}

	accept(): FileKind | null {
		const { looked } = this;
		if (!looked || looked.kind === 'refused' || this.blocked) return null;
		if (looked.kind === 'boundary') {
			const boundary = structuredClone(this.chosenParts);
			this.#store.editPlot('Take a boundary from a file', (draft) => void (draft.boundary = boundary));
		} else {
			const skyline = structuredClone(looked.reading.points);
			this.#store.editPlot('Take a skyline from a file', (draft) => void (draft.skyline = skyline));
		}
		this.discard();
		return looked.kind;
	}

	discard(): void {
		this.looked = null;
		this.#bytes = null;
		this.chosen = [];
		this.agreed = false;
	}
}

function unreadable(error: unknown): Refusal {
	return {
		ok: false,
		problem: 'unreadable',
		message: `The file could not be read. ${error instanceof Error ? error.message : ''}`.trim(),
		remedy: 'Look whether it is still there and choose it again.'
	};
}
