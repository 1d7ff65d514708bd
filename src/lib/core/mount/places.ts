import type { Mount, MountEdge, TrackerModel } from '../document';

export const MOUNT_EDGES: readonly MountEdge[] = ['top', 'bottom', 'left', 'right'];

/** Candidate mounts of one model: evenly spaced from the middle of each edge, ends included when they fall on it. */
export interface MountPlaces {
	mounts: Mount[];
	/** In table coordinates, metres: x to the right seen facing the glass, y up. */
	xs: Float64Array;
	ys: Float64Array;
	/** By edge: the index of its first place, their number, where the first stands along the edge, and its line. */
	edges: Record<MountEdge, { first: number; count: number; startM: number; lineM: number }>;
	spacingM: number;
	forwardM: number;
	/** How far any place stands outside the glass, metres. */
	outM: number;
}

/** Where a mount's head stands on the table, metres from its middle: x right, y up, z in front of the glass. */
export function mountPoint(
	model: Pick<TrackerModel, 'widthM' | 'heightM'>,
	mount: Mount
): { xM: number; yM: number; zM: number } {
	const side = model.widthM / 2 + mount.outM;
	const rise = model.heightM / 2 + mount.outM;
	switch (mount.edge) {
		case 'top':
			return { xM: mount.alongM, yM: rise, zM: mount.forwardM };
		case 'bottom':
			return { xM: mount.alongM, yM: -rise, zM: mount.forwardM };
		case 'right':
			return { xM: side, yM: mount.alongM, zM: mount.forwardM };
		case 'left':
			return { xM: -side, yM: mount.alongM, zM: mount.forwardM };
	}
}

/** All candidates of a model; a head never stands nearer to the glass than the frame's outer edge. */
export function mountPlaces(
	model: TrackerModel,
	options: { spacingM: number; outM: number; forwardM: number }
): MountPlaces {
	const outM = Math.max(options.outM, model.frameMarginM);
	const mounts: Mount[] = [];
	const edges = {} as MountPlaces['edges'];
	for (const edge of MOUNT_EDGES) {
		const level = edge === 'top' || edge === 'bottom';
		const half = (level ? model.widthM : model.heightM) / 2;
		const steps = Math.floor(half / options.spacingM + 1e-9);
		const line = (level ? model.heightM : model.widthM) / 2 + outM;
		edges[edge] = {
			first: mounts.length,
			count: 2 * steps + 1,
			startM: -steps * options.spacingM,
			lineM: edge === 'bottom' || edge === 'left' ? -line : line
		};
		for (let k = -steps; k <= steps; k++) {
			// Rounded to a tenth of a millimetre, so that equal places of unlike models are equal numbers.
			const alongM = Math.round(k * options.spacingM * 1e4) / 1e4 + 0;
			mounts.push({ edge, alongM, outM, forwardM: options.forwardM });
		}
	}
	const points = mounts.map((mount) => mountPoint(model, mount));
	return {
		mounts,
		xs: Float64Array.from(points, (p) => p.xM),
		ys: Float64Array.from(points, (p) => p.yM),
		edges,
		spacingM: options.spacingM,
		forwardM: options.forwardM,
		outM
	};
}

/**
 * Marks the places that lie inside a convex shadow on the plane of the heads: on each edge they are one run, found
 * from where the edge's line enters and leaves the shadow.
 */
export function markShaded(
	places: MountPlaces,
	shadow: Float64Array,
	corners: number,
	marks: Uint8Array
): void {
	for (const edge of MOUNT_EDGES) {
		const { first, count, startM, lineM } = places.edges[edge];
		// c is the coordinate across the edge, 1 - c the one along it.
		const c = edge === 'top' || edge === 'bottom' ? 1 : 0;
		let low = Infinity;
		let high = -Infinity;
		for (let k = 0, j = corners - 1; k < corners; j = k++) {
			const a = shadow[2 * j + c];
			const b = shadow[2 * k + c];
			if (a <= lineM === b <= lineM) continue;
			const from = shadow[2 * j + 1 - c];
			const at = from + ((shadow[2 * k + 1 - c] - from) * (lineM - a)) / (b - a);
			if (at < low) low = at;
			if (at > high) high = at;
		}
		if (low >= high) continue;
		const begin = Math.max(0, Math.ceil((low - startM) / places.spacingM));
		const end = Math.min(count - 1, Math.floor((high - startM) / places.spacingM));
		for (let k = begin; k <= end; k++) marks[first + k] = 1;
	}
}
