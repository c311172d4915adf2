import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { lookUp, type FeaturePlace } from './lookup';
import { WORDS } from './lookupWords';
import { positions } from './numbers';
import { teeth, toothOf } from './teeth';

/** A made-up table: most C-shapes in lower second molars, an isthmus of the mesial root, an extra root. */
const RECORDED: FeaturePlace[] = [
	{ feature: 'c-shape', tooth: 'mandibular-second-molar' },
	{ feature: 'isthmus', tooth: 'mandibular-first-molar', root: 'M' },
	{ feature: 'c-shape', tooth: 'mandibular-first-premolar' },
	{ feature: 'c-shape', tooth: 'mandibular-first-molar' },
	{ feature: 'radix-entomolaris', tooth: 'mandibular-first-molar' },
	{ feature: 'isthmus', tooth: 'maxillary-first-molar', root: 'MB' },
	{ feature: 'apical-delta', tooth: 'mandibular-canine', root: 'single' }
];

/** A hit without its reason: `16 MB` or `maxillary-first-molar`. */
function short(query: string, system?: Parameters<typeof lookUp>[1]): string[] {
	return lookUp(query, system, RECORDED).map((hit) =>
		[hit.iso ?? hit.tooth, hit.root].filter(Boolean).join(' ')
	);
}

describe('lookUp goes straight to', () => {
	it.each([
		['16', '16'],
		[' 16 ', '16'],
		['#3', '16'],
		['# 14', '26'],
		['UR6', '16'],
		['ul6', '26'],
		['LL 7', '37'],
		['lr-8', '48'],
		['6┘', '16'],
		['fdi 16', '16'],
		['universal 16', '28'],
		['upper left first molar', '26'],
		['First Molar, upper left', '26'],
		['molar upper first left', '26'],
		['left molar, first, upper', '26'],
		['mésiobuccal root of 16', '16 MB'],
		['upper right 6', '16'],
		['maxillary first molar', 'maxillary-first-molar'],
		['lower 6', 'mandibular-first-molar'],
		['lower sixes', 'mandibular-first-molar'],
		['upperfirstmolar', 'maxillary-first-molar'],
		['lower lateral', 'mandibular-lateral-incisor'],
		['upper cuspids', 'maxillary-canine'],
		['lower left wisdom tooth', '38'],
		['16 mb2', '16 MB'],
		['16mb2', '16 MB'],
		['ul6 MB 2', '26 MB'],
		['46 ml', '46 M'],
		['36 mb', '36 M'],
		['lower first molar middle mesial', 'mandibular-first-molar M'],
		['lower left first molar radix entomolaris', '36 DL'],
		['14 palatal root', '14 P']
	])('%j', (query, expected) => {
		expect(short(query)[0]).toBe(expected);
		expect(lookUp(query)[0].exact).toBe(true);
	});
});

describe('lookUp offers', () => {
	it.each([
		['mb2', ['maxillary-first-molar MB', 'maxillary-second-molar MB', 'maxillary-third-molar MB']],
		[
			'second mesiobuccal',
			['maxillary-first-molar MB', 'maxillary-second-molar MB', 'maxillary-third-molar MB']
		],
		['middle mesial', ['mandibular-first-molar M', 'mandibular-second-molar M', 'mandibular-third-molar M']],
		['radix', ['mandibular-first-molar DL', 'mandibular-second-molar DL', 'mandibular-third-molar DL']],
		['c-shape', ['mandibular-second-molar', 'mandibular-first-premolar', 'mandibular-first-molar']],
		['C shaped canals', ['mandibular-second-molar', 'mandibular-first-premolar', 'mandibular-first-molar']],
		['c-shape lower molar', ['mandibular-second-molar', 'mandibular-first-molar']],
		['isthmus', ['mandibular-first-molar M', 'maxillary-first-molar MB']],
		['istmus upper', ['maxillary-first-molar MB']],
		['isthmus mesial root', ['mandibular-first-molar M']],
		['isthmus distal root', []],
		['extra root', ['mandibular-first-molar']],
		['extra distolingual root lower', ['mandibular-first-molar']],
		['apical deltas', ['mandibular-canine single']],
		// Recorded nowhere: no place is made up.
		['dens in dente', []],
		[
			'premolar',
			[
				'maxillary-first-premolar',
				'maxillary-second-premolar',
				'mandibular-first-premolar',
				'mandibular-second-premolar'
			]
		],
		['palatal premolar', ['maxillary-first-premolar P', 'maxillary-second-premolar P']],
		['left 6', ['26', '36']],
		['lower incisor lingual', ['mandibular-central-incisor single', 'mandibular-lateral-incisor single']],
		// A digit beside a kind may be a count of canals.
		['lower molar 2', ['mandibular-second-molar']],
		// Misspelt or unfinished.
		['uper frist molar', ['maxillary-first-molar']],
		['mandibluar canine', ['mandibular-canine']],
		['uppr rihgt secnd premoler', ['15']],
		['prem lower', ['mandibular-first-premolar', 'mandibular-second-premolar']],
		['upper first molar please', ['maxillary-first-molar']],
		// No such root: the tooth is offered without it.
		['upper first molar radix', ['maxillary-first-molar']]
	])('%j', (query, expected) => {
		expect(short(query)).toEqual(expected);
		expect(lookUp(query).some((hit) => hit.exact)).toBe(false);
	});

	it('the tooth with a side and the feature, where both are typed', () => {
		expect(lookUp('37 c-shape', 'iso', RECORDED)).toMatchObject([
			{ tooth: 'mandibular-second-molar', iso: '37', feature: 'c-shape', exact: true }
		]);
	});

	it('both readings of a bare digit, and says which they are', () => {
		const hits = lookUp('3');
		expect(hits.map((hit) => hit.iso)).toEqual(['16', '13', '23', '33', '43']);
		expect(hits[0].why).toBe('Universal number #3: Upper right first molar');
		expect(hits[1].why).toBe('Palmer UR3: Upper right canine');
		expect(hits.some((hit) => hit.exact)).toBe(false);
	});

	it('the other system second where a number is a tooth in both', () => {
		expect(short('16')).toEqual(['16', '28']);
		expect(short('16', 'universal')).toEqual(['28', '16']);
		expect(lookUp('16', 'universal').map((hit) => hit.exact)).toEqual([true, false]);
		expect(lookUp('3', 'universal')[0]).toMatchObject({ iso: '16', exact: true });
		expect(short('6', 'palmer')).toEqual(['16', '26', '36', '46', '13']);
	});

	it('a number of another system than the picked one, without going there', () => {
		expect(lookUp('19')).toMatchObject([{ iso: '36', exact: false }]);
		expect(lookUp('14 upper left')).toMatchObject([{ iso: '26', exact: false }]);
	});

	it('a reason that says how words were read', () => {
		expect(lookUp('16 mb2')[0].why).toBe(
			'ISO 3950 number 16: Upper right first molar; MB2 is a canal of the mesiobuccal root'
		);
		expect(lookUp('uper frist molar')[0].why).toBe('Upper first molar; nearest to what was typed');
		expect(lookUp('upper canine please')[0].why).toBe('Upper canine; not understood: please');
	});

	it('no tooth for counts of roots', () => {
		expect(short('upper first premolar two roots')).toEqual(['maxillary-first-premolar']);
	});
});

describe('lookUp finds nothing for', () => {
	it.each([
		'',
		'   ',
		'?',
		'51',
		'99',
		'#33',
		'#0',
		'00',
		'xyzzy',
		'tooth',
		'UR9',
		'36 upper right',
		'16 26'
	])('%j', (query) => {
		expect(lookUp(query)).toEqual([]);
	});
});

describe('lookUp, whatever is typed', () => {
	const word = fc.constantFrom(...WORDS.keys(), '16', '#3', 'ur6', '3', 'mb2', '8', 'frist', 'zzz');
	const query = fc.oneof(
		fc.string({ unit: 'grapheme' }),
		fc.array(word, { maxLength: 5 }).map((words) => words.join(' '))
	);

	it('gives at most eight different hits that exist, only the first of them exact', () => {
		fc.assert(
			fc.property(
				query,
				fc.constantFrom('iso' as const, 'universal' as const, 'palmer' as const),
				(text, system) => {
					const hits = lookUp(text, system);
					expect(hits.length).toBeLessThanOrEqual(8);
					expect(hits.slice(1).every((hit) => !hit.exact)).toBe(true);
					expect(new Set(hits.map((hit) => `${hit.tooth} ${hit.iso} ${hit.root}`)).size).toBe(hits.length);
					for (const hit of hits) {
						const tooth = toothOf(hit.tooth);
						expect(tooth).toBeDefined();
						if (hit.iso) expect(tooth?.iso).toContain(hit.iso);
						if (hit.root) expect(tooth?.roots).toContain(hit.root);
						expect(hit.why).not.toBe('');
					}
				}
			),
			{ numRuns: 500 }
		);
	});

	it('finds each of the 32 places by each of its numbers and by its words', () => {
		for (const position of positions) {
			const name = toothOf(position.tooth)?.name ?? '';
			const queries = [
				position.iso,
				`#${position.universal}`,
				position.palmer,
				position.palmer.toLowerCase(),
				position.palmerBracket,
				`${position.side} ${name}`
			];
			for (const text of queries) {
				expect(lookUp(text)[0]).toMatchObject({ tooth: position.tooth, iso: position.iso, exact: true });
			}
		}
	});

	it('finds each tooth by its name and by its slug', () => {
		for (const tooth of teeth) {
			expect(lookUp(tooth.name)).toMatchObject([{ tooth: tooth.id, exact: true }]);
			expect(lookUp(tooth.id)).toMatchObject([{ tooth: tooth.id, exact: true }]);
		}
	});
});
