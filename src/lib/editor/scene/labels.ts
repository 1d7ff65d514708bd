import type { Vec3 } from '$lib/core';
import { cameraFrame, projectFrom, type SpaceCamera } from '../kernels/space-camera';

export interface Label {
	text: string;
	at: Vec3;
	strong: boolean;
}

/** Two tags nearer than this would run into each other, pixels. */
const roomPx = 22;

/** Writes labels over the scene at their places; of two that would overlap, the stronger or the earlier stays. */
export function drawLabels(
	canvas: HTMLCanvasElement,
	camera: SpaceCamera,
	labels: readonly Label[],
	ink: string,
	halo: string
): void {
	const context = canvas.getContext('2d');
	if (!context) return;
	const ratio = Math.min(2, globalThis.devicePixelRatio || 1);
	const width = Math.round(camera.widthPx * ratio);
	const height = Math.round(camera.heightPx * ratio);
	if (canvas.width !== width || canvas.height !== height) {
		canvas.width = width;
		canvas.height = height;
	}
	context.setTransform(ratio, 0, 0, ratio, 0, 0);
	context.clearRect(0, 0, camera.widthPx, camera.heightPx);
	context.textAlign = 'center';
	context.textBaseline = 'middle';
	context.lineJoin = 'round';
	context.strokeStyle = halo;
	context.fillStyle = ink;
	const frame = cameraFrame(camera);
	const taken = new Set<string>();
	const ordered = [...labels].sort((a, b) => Number(b.strong) - Number(a.strong));
	for (const label of ordered) {
		const place = projectFrom(camera, frame, label.at);
		if (!place) continue;
		const [x, y] = place;
		if (x < -20 || y < -20 || x > camera.widthPx + 20 || y > camera.heightPx + 20) continue;
		const cell = `${Math.round(x / (roomPx * 1.6))} ${Math.round(y / (roomPx * 0.7))}`;
		if (!label.strong && taken.has(cell)) continue;
		taken.add(cell);
		context.font = `${label.strong ? 800 : 500} 11.5px 'Manrope Variable', sans-serif`;
		context.lineWidth = 3;
		context.strokeText(label.text, x, y);
		context.fillText(label.text, x, y);
	}
}
