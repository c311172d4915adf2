import { readFileSync } from 'node:fs';
import { secondCone, secondLength } from '$lib/geometry/joined';
import { describe, expect, it } from 'vitest';

interface JoinedCase {
	secondWorkingLength: number;
	level: number;
	/** Sizes in hundredths of a mm (ISO 3630-1). */
	canal: { size: number; taper: number };
	cone: { size: number; taper: number };
	secondLength: number;
	diameterAtJoin: number;
	cutFromTip: number;
}

const { joined } = JSON.parse(readFileSync('tests/reference/geometry.json', 'utf8')) as {
	joined: JoinedCase[];
};
/** The file's own tolerance, mm. */
const TOLERANCE_MM = 0.005;
const shape = ({ size, taper }: { size: number; taper: number }) => ({ tip: size / 100, taper });

describe('the second cone of joined canals (geometry.json)', () => {
	it('has cases to reproduce', () => expect(joined.length).toBeGreaterThanOrEqual(3));

	it.each(joined)('WL $secondWorkingLength mm, confluence at $level mm', (given) => {
		const cone = secondCone(given.level, 'full', shape(given.canal), shape(given.cone));
		const differences = [
			secondLength(given.secondWorkingLength, given.level) - given.secondLength,
			cone.diameterAtConfluence! - given.diameterAtJoin,
			cone.cutFromTip! - given.cutFromTip
		];
		for (const difference of differences) expect(Math.abs(difference)).toBeLessThanOrEqual(TOLERANCE_MM);
	});
});
