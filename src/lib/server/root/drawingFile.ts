import { render } from 'svelte/server';
import RootPicture from '$lib/components/drawing/RootPicture.svelte';
import { layoutExpectation, type ExpectationData } from '$lib/drawing/expectation';
import { palette } from '$lib/palette';
import { wrapText } from './wrapText';

/** What the file of a drawing says beside the drawing. */
interface DrawingFile {
	data: ExpectationData;
	/** Name of the picture. */
	label: string;
	/** What it shows, in a sentence or two. */
	description: string;
	/** The sequence drawn alone; null: all. */
	show: string | null;
	/** Paragraphs under the drawing: figures, sources, filters, revision and date. */
	notes: readonly string[];
}

const SIZE = { width: 372, height: 500 };
const FONT = "'Noto Sans', 'DejaVu Sans', Arial, sans-serif";
const NOTE_PX = 11;
const NOTE_LINE_PX = 16;
const NOTE_MARGIN = 12;
/** At 11 px this many letters of any of the fonts stay inside the width. */
const NOTE_LETTERS = 58;

/** Presentation attributes of the classes that the drawing's components use; a file has no style sheet. */
const ATTRIBUTES: Record<string, string> = {
	'fill-none': 'fill="none"',
	'text-small': 'font-size="14"',
	...Object.fromEntries(
		Object.entries(palette.light).flatMap(([name, colour]) => [
			[`fill-${name}`, `fill="${colour}"`],
			[`stroke-${name}`, `stroke="${colour}"`]
		])
	)
};
/** Classes that only matter on a screen. */
const ON_SCREEN = /^(h-auto|w-full|tabular-nums|motion-safe:.*)$/;

/**
 * Turns classes into presentation attributes.
 * @throws Error for a class that has none, so that a drawing cannot lose its colours unseen
 */
function withAttributes(svg: string): string {
	return svg.replace(/ class="([^"]*)"/g, (_, classes: string) =>
		classes
			.split(/\s+/)
			.filter((name) => name !== '' && !ON_SCREEN.test(name))
			.map((name) => {
				if (!(name in ATTRIBUTES)) throw new Error(`The class ${name} has no presentation attribute.`);
				return ` ${ATTRIBUTES[name]}`;
			})
			.join('')
	);
}

const escape = (text: string) =>
	text.replace(
		/[&<>"]/g,
		(sign) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' })[sign] ?? sign
	);

/** The drawing of a root as an SVG that needs nothing beside itself: own colours, fonts with fallbacks, its words under it. */
export function drawingSvg({ data, label, description, show, notes }: DrawingFile): string {
	const layout = layoutExpectation(data, SIZE);
	const isolated = layout.streams.some(({ sequence }) => sequence === show) ? show : null;
	const { body } = render(RootPicture, { props: { layout, label, description, isolated } });
	const bare = withAttributes(body.replace(/<!--[\s\S]*?-->/g, '')).trim();
	const lines = notes.flatMap((note) => [...wrapText(note, NOTE_LETTERS), '']);
	const height = layout.height + NOTE_MARGIN + lines.length * NOTE_LINE_PX;
	const written = lines.map((text, i) => {
		const y = layout.height + NOTE_MARGIN + (i + 0.5) * NOTE_LINE_PX;
		return text === '' ? '' : `<text x="${NOTE_MARGIN}" y="${y}">${escape(text)}</text>`;
	});
	const ground = `<rect width="${layout.width}" height="${height}" fill="${palette.light.paper}"/>`;
	return bare
		.replace(
			/^<svg([^>]*?) viewBox="[^"]*"/,
			`<svg xmlns="http://www.w3.org/2000/svg" width="${layout.width}" height="${height}" viewBox="0 0 ${layout.width} ${height}" font-family="${FONT}"$1`
		)
		.replace('</desc>', `</desc>${ground}`)
		.replace(
			/<\/svg>$/,
			`<g font-size="${NOTE_PX}" fill="${palette.light.ink}">${written.join('')}</g></svg>\n`
		);
}
