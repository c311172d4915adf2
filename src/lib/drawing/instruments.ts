import { line } from 'd3';

/** A polyline in units of a drawing, from the handle to the tip. */
export type Track = [number, number][];

const joined = line().digits(2);

/**
 * The same track with points at even distances.
 *
 * @param spacing distance between two points, above 0
 */
export function evenTrack(track: Track, spacing: number): Track {
	const even: Track = [track[0]];
	let since = 0;
	for (let i = 1; i < track.length; i++) {
		const [[ax, ay], [bx, by]] = [track[i - 1], track[i]];
		const length = Math.hypot(bx - ax, by - ay);
		let at = spacing - since;
		for (; at <= length; at += spacing)
			even.push([ax + ((bx - ax) * at) / length, ay + ((by - ay) * at) / length]);
		since = length - (at - spacing);
	}
	return even;
}

/** Unit normal of a track at a point. */
function normalAt(track: Track, i: number): [number, number] {
	const [ax, ay] = track[Math.max(0, i - 1)];
	const [bx, by] = track[Math.min(track.length - 1, i + 1)];
	const length = Math.hypot(bx - ax, by - ay) || 1;
	return [-(by - ay) / length, (bx - ax) / length];
}

function offset(track: Track, by: (i: number) => number): Track {
	return track.map(([x, y], i): [number, number] => {
		const [nx, ny] = normalAt(track, i);
		return [x + nx * by(i), y + ny * by(i)];
	});
}

/**
 * A cone along a canal: widest at its head, blunt at its tip.
 *
 * @param head half width at the first point
 * @param tip half width at the last point
 */
export function conePath(track: Track, head: number, tip: number): string {
	const half = (i: number) => head + ((tip - head) * i) / (track.length - 1);
	const left = offset(track, half);
	const right = offset(track, (i) => -half(i)).reverse();
	return `${joined([...left, ...right]) ?? ''}Z`;
}

/**
 * A file along a canal: a smooth shank, then flutes that grow finer towards the tip.
 *
 * @param flute half width of the first flute
 */
export function filePath(track: Track, flute: number): string {
	const shank = Math.floor(track.length * 0.3);
	const half = (i: number) => {
		if (i < shank || i === track.length - 1) return 0;
		const wide = flute * (1 - (0.7 * (i - shank)) / (track.length - shank));
		return i % 2 === 0 ? wide : -wide;
	};
	return joined(offset(track, half)) ?? '';
}

/** The handle of a file whose shank begins at (x, y): a box that stands above it. */
export function handlePath(x: number, y: number, width: number, height: number): string {
	return `${
		joined([
			[x - width / 2, y],
			[x - width / 2, y - height],
			[x + width / 2, y - height],
			[x + width / 2, y]
		]) ?? ''
	}Z`;
}

/** An arrow from one point to another, its head `size` long. */
export function arrowPath(from: [number, number], to: [number, number], size: number): string {
	const angle = Math.atan2(to[1] - from[1], to[0] - from[0]);
	const barb = (turn: number): [number, number] => [
		to[0] - size * Math.cos(angle + turn),
		to[1] - size * Math.sin(angle + turn)
	];
	return `${joined([from, to]) ?? ''}${joined([barb(0.5), to, barb(-0.5)]) ?? ''}`;
}

/** An ellipse round (x, y). */
export function ovalPath(x: number, y: number, radiusX: number, radiusY: number): string {
	const arc = `A${radiusX},${radiusY} 0 0 1`;
	const [left, right, level] = [x - radiusX, x + radiusX, y].map((value) => value.toFixed(2));
	return `M${left},${level}${arc} ${right},${level}${arc} ${left},${level}Z`;
}
