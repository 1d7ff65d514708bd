export interface BlockShade {
	/** Shaded share of the table's area, 0..1. */
	geometricShare: number;
	/** Groups of cells behind one bypass diode that have any cell shaded. */
	shadedBlocks: number;
	/** All such groups of the table. */
	blocks: number;
}

export interface ElectricalLoss {
	/** Share of the power from beam and circumsolar light that is lost, 0..1. */
	loss: number;
	/** Bounds that no wiring can leave: the geometric share, and everything. */
	least: number;
	most: number;
}

/**
 * Loss of a partly shaded table: Martinez-Moreno, Munoz and Lorenzo 2010 (Solar Energy Materials and Solar Cells
 * 94:2298-2303, eq. 6), 1 - FES = (1 - FGS) (1 - NSB / (NTB + 1)). Applies to beam and circumsolar light, not to what
 * comes from the rest of the sky. The formula is empirical: show it with its bounds, never as one certain number.
 */
export function stringEffect({ geometricShare, shadedBlocks, blocks }: BlockShade): ElectricalLoss {
	if (!(geometricShare >= 0 && geometricShare <= 1)) {
		throw new RangeError(`String effect: shaded share ${geometricShare} is not within 0..1`);
	}
	if (!(blocks >= 1) || !(shadedBlocks >= 0 && shadedBlocks <= blocks)) {
		throw new RangeError(`String effect: ${shadedBlocks} shaded blocks of ${blocks}`);
	}
	return { loss: stringLoss(geometricShare, shadedBlocks, blocks), least: geometricShare, most: 1 };
}

/** The loss of `stringEffect` alone, for runs that ask millions of times; nothing is checked. */
export function stringLoss(geometricShare: number, shadedBlocks: number, blocks: number): number {
	const formula = 1 - (1 - geometricShare) * (1 - shadedBlocks / (blocks + 1)); // eq. 6
	return Math.min(1, Math.max(geometricShare, formula));
}
