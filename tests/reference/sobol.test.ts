import { describe, expect, it } from 'vitest';
import { sobolCoordinate } from '$lib/server/inference/sobol';
import reference from './sobol.json';

describe('Sobol points', () => {
	it('are those of scipy (source in sobol.json), in all 24 dimensions', () => {
		const ours = reference.indices.map((index) =>
			Array.from({ length: 24 }, (_, dimension) => sobolCoordinate(dimension)[index])
		);
		expect(ours).toEqual(reference.points);
	});
});
