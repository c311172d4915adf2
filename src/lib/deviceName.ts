const BROWSERS: [RegExp, string][] = [
	[/\bEdg(?:e|A|iOS)?\//, 'Edge'],
	[/\bOPR\//, 'Opera'],
	[/\b(?:Firefox|FxiOS)\//, 'Firefox'],
	[/\b(?:HeadlessChrome|Chrome|CriOS|Chromium)\//, 'Chrome'],
	[/\bSafari\//, 'Safari']
];
const SYSTEMS: [RegExp, string][] = [
	[/iPhone/, 'iPhone'],
	[/iPad/, 'iPad'],
	[/Android/, 'Android'],
	[/Windows/, 'Windows'],
	[/Macintosh|Mac OS X/, 'Mac'],
	[/CrOS/, 'ChromeOS'],
	[/Linux/, 'Linux']
];

/** A short name of a device from what its browser says it is, such as "Firefox, Windows"; null if it says nothing that is known. */
export function deviceName(agent: string): string | null {
	const find = (list: [RegExp, string][]) => list.find(([pattern]) => pattern.test(agent))?.[1];
	return [find(BROWSERS), find(SYSTEMS)].filter(Boolean).join(', ') || null;
}
