import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { secondCone } from './joined';

const preparation = { tip: 0.25, taper: 0.06 };

describe('secondCone', () => {
	it('cuts J off a matched cone when the canal was shaped to full length (domain: If they join)', () => {
		fc.assert(
			fc.property(
				fc.double({ min: 0, max: 12, noNaN: true }),
				fc.double({ min: 0.1, max: 0.8, noNaN: true }),
				fc.double({ min: 0.02, max: 0.12, noNaN: true }),
				(level, tip, taper) => {
					const { cutFromTip } = secondCone(level, 'full', { tip, taper }, { tip, taper });
					expect(Math.abs(cutFromTip! - level)).toBeLessThan(1e-3);
				}
			)
		);
	});

	it('leaves the matched cone uncut when the canal was shaped only to the confluence', () => {
		expect(secondCone(3, 'confluence', preparation, preparation)).toEqual({
			diameterAtConfluence: 0.25,
			cutFromTip: 0,
			remarks: []
		});
		expect(secondCone(3, 'confluence')).toEqual({
			diameterAtConfluence: null,
			cutFromTip: 0,
			remarks: ['if-matched']
		});
	});

	it('fits a thinner cone to a canal shaped only to the confluence', () => {
		expect(secondCone(3, 'confluence', preparation, { tip: 0.2, taper: 0.05 }).cutFromTip).toBeCloseTo(1, 12);
	});

	it('proposes nothing where it would have to guess', () => {
		expect(secondCone(3, 'unknown', preparation, preparation).cutFromTip).toBeNull();
		expect(secondCone(3, 'full', preparation).cutFromTip).toBeNull();
		expect(secondCone(3, 'full', undefined, preparation)).toEqual({
			diameterAtConfluence: null,
			cutFromTip: null,
			remarks: []
		});
		expect(secondCone(3, 'full', preparation, { tip: 0.25, taper: 0 }).cutFromTip).toBeNull();
	});

	it('never cuts a cone that is already thicker than the canal, and says so', () => {
		const thick = secondCone(2, 'full', preparation, { tip: 0.4, taper: 0.04 });
		expect(thick).toEqual({ diameterAtConfluence: 0.37, cutFromTip: 0, remarks: ['too-thick'] });
	});

	it('says when a cone is steeper, a cut longer than its tapered part, or a diameter extrapolated', () => {
		const steep = secondCone(3, 'full', { tip: 0.25, taper: 0.04 }, { tip: 0.25, taper: 0.06 });
		expect(steep.cutFromTip).toBeCloseTo(2, 12);
		expect(steep.remarks).toEqual(['steeper-cone']);
		const long = secondCone(8, 'full', { tip: 0.4, taper: 0.06 }, { tip: 0.2, taper: 0.02 });
		expect(long.cutFromTip).toBeCloseTo(34, 12);
		expect(long.remarks).toEqual(['cut-too-long']);
		const short = { ...preparation, taperedLength: 2 };
		expect(secondCone(3, 'full', short, preparation).remarks).toEqual(['beyond-taper']);
	});

	it('gives the cut cone the diameter of the canal at the confluence', () => {
		const [canal, cone] = [
			{ tip: 0.3, taper: 0.05 },
			{ tip: 0.25, taper: 0.04 }
		];
		const { cutFromTip, diameterAtConfluence } = secondCone(2.6, 'full', canal, cone);
		expect(cone.tip + cone.taper * cutFromTip!).toBeCloseTo(diameterAtConfluence!, 12);
	});
});
