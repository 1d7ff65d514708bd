/** Pieces of the sky: where each stands and how much of the sphere it is. */
export interface SkyDirections {
	count: number;
	azimuthDeg: Float64Array;
	elevationDeg: Float64Array;
	/** Steradians; together 2 pi. */
	weight: Float64Array;
	/** 1 for the lowest ring, which stands for the band at the horizon. */
	lowest: Uint8Array;
}

/** Rings and pieces of a ring that energy runs use. */
export const SKY_RINGS = 6;
export const SKY_PER_RING = 16;

/**
 * Directions over the sky for sums over solid angle. Elevation by Gauss-Legendre in sin e, since equal steps of sin e are
 * equal pieces of sky (Archimedes); azimuth in equal steps, each ring turned by another part of a step (the golden ratio,
 * so that no ring lines up with the rows of a field). Deterministic.
 */
export function skyDirections(rings = SKY_RINGS, perRing = SKY_PER_RING): SkyDirections {
	const { nodes, weights } = gaussLegendre01(rings);
	const count = rings * perRing;
	const out: SkyDirections = {
		count,
		azimuthDeg: new Float64Array(count),
		elevationDeg: new Float64Array(count),
		weight: new Float64Array(count),
		lowest: new Uint8Array(count)
	};
	for (let r = 0, k = 0; r < rings; r++) {
		const turn = ((r + 0.5) * 0.6180339887498949) % 1;
		for (let p = 0; p < perRing; p++, k++) {
			out.azimuthDeg[k] = ((p + turn) * 360) / perRing;
			out.elevationDeg[k] = (Math.asin(nodes[r]) * 180) / Math.PI;
			out.weight[k] = (weights[r] * 2 * Math.PI) / perRing;
			out.lowest[k] = r === 0 ? 1 : 0;
		}
	}
	return out;
}

/** Nodes and weights of Gauss-Legendre quadrature on 0..1, rising: roots of the Legendre polynomial by Newton's way. */
export function gaussLegendre01(n: number): { nodes: Float64Array; weights: Float64Array } {
	const nodes = new Float64Array(n);
	const weights = new Float64Array(n);
	for (let k = 0; k < n; k++) {
		let x = Math.cos((Math.PI * (n - k - 0.25)) / (n + 0.5));
		let slope = 1;
		for (let round = 0; round < 50; round++) {
			let p = 1;
			let before = 0;
			for (let j = 1; j <= n; j++) {
				const next = ((2 * j - 1) * x * p - (j - 1) * before) / j;
				before = p;
				p = next;
			}
			slope = (n * (x * p - before)) / (x * x - 1);
			const step = p / slope;
			x -= step;
			if (Math.abs(step) < 1e-15) break;
		}
		nodes[k] = (x + 1) / 2;
		weights[k] = 1 / ((1 - x * x) * slope * slope);
	}
	return { nodes, weights };
}
