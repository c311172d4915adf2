import { test as base, expect, type Locator, type Page } from '@playwright/test';

export { expect };

interface Watch {
	/** Messages of the console and of the content security policy that a test expects, such as the 404 it asks for. */
	expectedMessages: RegExp[];
}

/** A test fails on any error in the console, any uncaught error, and any violation of the content security policy. */
export const test = base.extend<Watch & { watched: void }>({
	expectedMessages: [[], { option: true }],
	watched: [
		async ({ context, expectedMessages }, use) => {
			const complaints: string[] = [];
			await context.exposeFunction('reportViolation', (text: string) => complaints.push(`CSP: ${text}`));
			await context.addInitScript(() => {
				document.addEventListener('securitypolicyviolation', (event) => {
					const report = (window as typeof window & { reportViolation: (text: string) => void })
						.reportViolation;
					report(`${event.effectiveDirective} ${event.blockedURI} ${event.sourceFile}:${event.lineNumber}`);
				});
			});
			context.on('console', (message) => {
				if (message.type() === 'error' || message.type() === 'warning') complaints.push(message.text());
			});
			context.on('weberror', (error) => complaints.push(`uncaught: ${error.error().message}`));
			await use();
			const unexpected = complaints.filter((text) => !expectedMessages.some((pattern) => pattern.test(text)));
			expect(unexpected, 'complaints of the browser').toEqual([]);
		},
		{ auto: true }
	]
});

/** Goes to a page and waits until its scripts have run, so that keys and clicks meet the enhanced controls. */
export async function open(page: Page, address: string) {
	await page.goto(address, { waitUntil: 'networkidle' });
}

/** Presses Tab until an element has the focus, as somebody without a mouse would. */
export async function tabTo(page: Page, target: Locator) {
	await expect(target).toBeVisible();
	for (let presses = 0; presses < 250; presses++) {
		if (await target.evaluate((one) => one === document.activeElement)) return;
		await page.keyboard.press('Tab');
	}
	throw new Error('The element was not reached with the Tab key.');
}
