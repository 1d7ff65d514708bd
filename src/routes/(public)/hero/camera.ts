type Vec = readonly [number, number, number];

/** A point on the picture, px, and its distance along the view, m; null behind the eye. */
export type Seen = { x: number; y: number; depthM: number } | null;

export interface Camera {
	see: (point: Vec) => Seen;
	horizonY: number;
}

/**
 * A level-headed perspective eye: it looks along a bearing, and shifts the picture instead of tipping, so that posts
 * stay upright.
 * @param eye east, north, up, metres
 * @param bearingDeg clockwise from true north
 * @param focalPx picture distance
 * @param horizonPart where the horizon lies on the picture, 0 top .. 1 bottom
 */
export function makeCamera(
	eye: Vec,
	bearingDeg: number,
	focalPx: number,
	widthPx: number,
	heightPx: number,
	horizonPart: number
): Camera {
	const bearing = (bearingDeg * Math.PI) / 180;
	const [sin, cos] = [Math.sin(bearing), Math.cos(bearing)];
	const horizonY = heightPx * horizonPart;
	return {
		horizonY,
		see: ([e, n, u]) => {
			const [de, dn, du] = [e - eye[0], n - eye[1], u - eye[2]];
			const depthM = de * sin + dn * cos;
			if (depthM < 0.5) return null;
			const scale = focalPx / depthM;
			return { x: widthPx / 2 + (de * cos - dn * sin) * scale, y: horizonY - du * scale, depthM };
		}
	};
}
