import { testRefusals, type Refused } from './support/refused';

const QUESTION = {
	workingLengths: { first: 20.5, second: 19.5 },
	measurements: [{ kind: 'cone-mark', value: 3 }]
};
const CANAL = { tip: 0.25, taper: 0.06 };

const level = (name: string, change: object, fields: string[], status = 422): Refused => ({
	name,
	address: '/confluence-level',
	body: { ...QUESTION, ...change },
	status,
	fields
});
/** A request with one measurement. */
const measured = (name: string, measurement: object, field = 'value') =>
	level(name, { measurements: [measurement] }, [`measurements.0.${field}`]);
const lengths = (name: string, change: object, field: string) =>
	level(name, { workingLengths: { ...QUESTION.workingLengths, ...change } }, [field]);

testRefusals([
	level('a level without working lengths', { workingLengths: undefined }, ['workingLengths']),
	lengths('a working length in cm', { first: 2.05 }, 'workingLengths.first'),
	lengths('a working length of a tusk', { second: 400 }, 'workingLengths.second'),
	lengths('a working length as text', { first: '20.5' }, 'workingLengths.first'),
	lengths('a working length that is null', { first: null }, 'workingLengths.first'),
	lengths('a third working length', { third: 20 }, 'workingLengths.third'),
	level('a level without measurements', { measurements: [] }, ['measurements']),
	level('measurements left out', { measurements: undefined }, ['measurements']),
	level(
		'too many measurements',
		{ measurements: Array.from({ length: 21 }, () => QUESTION.measurements[0]) },
		['measurements']
	),
	measured('a measurement of an unknown kind', { kind: 'hunch', value: 3 }, 'kind'),
	measured('a measurement without a value', { kind: 'cone-mark' }),
	measured('a negative measurement', { kind: 'cone-mark', value: -3 }),
	measured('a measurement that is NaN, which JSON writes as null', { kind: 'cone-mark', value: NaN }),
	measured('a measurement as text', { kind: 'cone-mark', value: '3' }),
	measured('a mark beyond the first working length', { kind: 'cone-mark', value: 21 }),
	measured('a contact beyond the second working length', { kind: 'file-contact', value: 19.6 }),
	measured('a reading above the second working length', { kind: 'cbct', value: 20 }),
	measured('a short cone where none was marked', { kind: 'cbct', value: 3, coneShortBy: 1 }, 'coneShortBy'),
	measured(
		'a cone that stopped short by less than nothing',
		{ kind: 'cone-mark', value: 3, coneShortBy: -1 },
		'coneShortBy'
	),
	measured('an extra field of a measurement', { kind: 'cbct', value: 3, unit: 'mm' }, 'unit'),
	level('a size where a diameter is asked for', { canal: { ...CANAL, tip: 25 } }, ['canal.tip']),
	level('a taper in percent', { canal: { ...CANAL, taper: 6 } }, ['canal.taper']),
	level('a cone without taper', { cone: { ...CANAL, taper: 0 } }, ['cone.taper']),
	level('a cone without tip', { cone: { taper: 0.06 } }, ['cone.tip']),
	level('an unknown way of shaping', { secondShapedTo: 'half' }, ['secondShapedTo']),
	level('a root without its tooth', { root: 'MB' }, ['tooth']),
	level('a tooth without its root', { tooth: 'maxillary-first-molar' }, ['root']),
	level('an unknown tooth of a level', { tooth: 'wisdom-tooth', root: 'MB' }, ['tooth'], 404),
	level('an unknown root of a level', { tooth: 'maxillary-first-molar', root: 'L' }, ['root'], 404),
	level('an unknown field of a level', { colour: 'blue' }, ['colour'])
]);
