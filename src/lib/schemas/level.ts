import { z } from 'zod';
import { probabilitySchema } from './common';
import { MEASUREMENT_KINDS, SHAPED_TO } from './terms';

const length = (name: string, least: number, most: number) =>
	z
		.number(`Give the ${name} in mm.`)
		.min(least, `Give the ${name} in mm, ${least} or more.`)
		.max(most, `Give the ${name} in mm, at most ${most}.`);

const workingLength = (which: string) => length(`working length of the ${which} canal`, 5, 40);

const tip = z
	.number('Give the tip diameter in mm (size 25 is 0.25).')
	.min(0.06, 'The tip diameter must be 0.06 mm (size 06) or more.')
	.max(1.4, 'The tip diameter must be 1.4 mm (size 140) or less; size 25 is 0.25 mm.');

const shape = (what: string, leastTaper: number) =>
	z.strictObject({
		tip: tip.describe(`Tip diameter of the ${what}, mm`),
		taper: z
			.number('Give the taper in mm per mm (.06 is 0.06).')
			.min(leastTaper, `The taper must be ${leastTaper} or more.`)
			.max(0.2, 'The taper must be 0.2 mm per mm (20 %) or less; 6 % is 0.06.')
			.describe(`Taper of the ${what}, mm per mm`),
		taperedLength: length('tapered length', 1, 30)
			.optional()
			.describe('Height above the tip up to which the taper holds, mm')
	});

const measurementSchema = z.strictObject({
	kind: z.enum(MEASUREMENT_KINDS, `The kind must be one of ${MEASUREMENT_KINDS.join(', ')}.`),
	value: length('measured length', 0, 40).describe(
		'mm. cone-mark: distance of the mark from the tip of the cone. cone-shortfall: how far the second cone stops short of its working ' +
			"length with the first cone in place. file-contact: the length of the second canal's file at which contact showed; the " +
			'level is the second working length less this. cbct: level above the common end, as read'
	),
	coneShortBy: length('distance that the marked cone stopped short', 0, 40)
		.optional()
		.describe(
			'cone-mark only: how far the marked cone stopped short of the first working length, mm; 0 if it went to length'
		)
});

export const levelRequestSchema = z
	.strictObject({
		tooth: z.string().optional().describe('Slug of the tooth; with the root, or neither'),
		root: z.string().optional().describe('Id of the root; with the tooth, or neither'),
		workingLengths: z.strictObject(
			{ first: workingLength('first'), second: workingLength('second') },
			'Give the working lengths of both canals.'
		),
		measurements: z
			.array(measurementSchema, 'Give the measurements as a list.')
			.min(1, 'Give at least one measurement.')
			.max(20, 'Give at most 20 measurements.')
			.describe('A kind may be given more than once: each counts as a measurement of its own'),
		canal: shape("second canal's preparation", 0).optional(),
		cone: shape("second canal's cone", 0.005).optional(),
		secondShapedTo: z
			.enum(SHAPED_TO, `Say one of ${SHAPED_TO.join(', ')}.`)
			.optional()
			.describe('How far the second canal was shaped; absent: unknown, and no cut is proposed')
	})
	.refine(({ tooth, root }) => tooth !== undefined || root === undefined, {
		path: ['tooth'],
		message: 'Name the tooth of the root, or leave both out.'
	})
	.refine(({ tooth, root }) => root !== undefined || tooth === undefined, {
		path: ['root'],
		message: 'Name the root of the tooth, or leave both out.'
	});
export type LevelRequest = z.infer<typeof levelRequestSchema>;

const mm = z.number().min(0);
const mmInterval = z.tuple([mm, mm]).describe('[lower, upper] in mm, 95 %');

export const levelResponseSchema = z.object({
	tableRevision: z.number().int(),
	level: z
		.object({ mean: mm, sd: mm, interval: mmInterval })
		.describe(
			'Level of the confluence above the common end, mm; never outside 0 to 12 mm or the second working length'
		),
	prior: z.union([
		z.literal('flat'),
		z.object({ mean: mm, sd: mm, source: z.string(), locator: z.string() })
	]),
	measurements: z
		.array(
			z.object({
				kind: z.enum(MEASUREMENT_KINDS),
				level: mm.describe('The level that this measurement alone speaks of, mm'),
				sd: mm.describe('Standard deviation taken for it, mm'),
				assumed: z.boolean().describe('True where no accuracy was ever published'),
				sources: z.array(z.string())
			})
		)
		.describe('In the order given'),
	secondLength: z
		.object({ mean: mm, interval: mmInterval })
		.describe('Length of the second cone if both canals share one exit, mm'),
	coneCutFromTip: mm
		.nullable()
		.describe(
			'Length to cut off the second cone, mm, at the mean level; null: something must be asked first'
		),
	diameterAtConfluence: mm
		.nullable()
		.describe('Diameter of the second canal where its cone ends, mm; null where it cannot be said'),
	coneNotes: z.array(z.string()).describe('What else should be known of the cone and its cut'),
	disagreement: z
		.object({ pValue: probabilitySchema, consistent: z.boolean() })
		.nullable()
		.describe('Chi-square of the measurements, without the prior; null with one measurement'),
	assumed: z.array(z.enum(MEASUREMENT_KINDS)).describe('Kinds used whose standard deviation is assumed'),
	notes: z.array(z.string()),
	cautions: z.array(z.string())
});
export type LevelDto = z.infer<typeof levelResponseSchema>;
