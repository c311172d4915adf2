import { setTimeout as wait } from 'node:timers/promises';
import { SMTPServer } from 'smtp-server';

const PATIENCE_MS = 30_000;

interface Letter {
	to: string[];
	headers: string;
	/** The plain text, decoded. */
	text: string;
	html: string;
	raw: string;
}

/** A mail server that keeps what it is given. It can go down and come back at the same port. */
export class Mailbox {
	readonly letters: Letter[] = [];
	private server: SMTPServer | null = null;

	constructor(readonly port: number) {}

	/** Address for SMTP_URL. */
	get url(): string {
		return `smtp://127.0.0.1:${this.port}`;
	}

	async up() {
		this.server = new SMTPServer({
			authOptional: true,
			disabledCommands: ['STARTTLS'],
			onData: (stream, session, done) => {
				let raw = '';
				stream.on('data', (chunk: Buffer) => (raw += chunk.toString('utf8')));
				stream.on('end', () => {
					const to = session.envelope.rcptTo.map(({ address }) => address);
					this.letters.push({ to, raw, headers: raw.split('\r\n\r\n')[0], ...partsOf(raw) });
					done();
				});
			}
		});
		await new Promise<void>((resolve, reject) => {
			this.server!.once('error', reject);
			this.server!.listen(this.port, '127.0.0.1', resolve);
		});
	}

	async down() {
		const server = this.server;
		this.server = null;
		if (server) await new Promise<void>((resolve) => server.close(resolve));
	}

	/** All letters to an address, the oldest first. */
	to(address: string): Letter[] {
		return this.letters.filter((letter) => letter.to.includes(address));
	}

	/** Waits for the letter number `count` to an address. */
	async wait(address: string, count = 1): Promise<Letter> {
		const deadline = Date.now() + PATIENCE_MS;
		while (Date.now() < deadline) {
			const letter = this.to(address)[count - 1];
			if (letter) return letter;
			await wait(50);
		}
		throw new Error(`Letter ${count} to ${address} did not come.`);
	}
}

/** The first address of this site in a letter. */
export function linkIn(letter: Letter): string {
	const link = /https?:\/\/\S+/.exec(letter.text)?.[0];
	if (!link) throw new Error(`No link in: ${letter.text}`);
	return link;
}

function partsOf(raw: string) {
	const part = (type: string) => {
		const [, head, body] =
			new RegExp(`(Content-Type: ${type}[\\s\\S]*?)\\r\\n\\r\\n([\\s\\S]*?)\\r\\n--`).exec(raw) ?? [];
		return body === undefined ? '' : decode(head, body);
	};
	return { text: part('text/plain'), html: part('text/html') };
}

function decode(head: string, body: string): string {
	if (/base64/i.test(head)) return Buffer.from(body, 'base64').toString('utf8');
	if (!/quoted-printable/i.test(head)) return body;
	const bytes = body
		.replace(/=\r\n/g, '')
		.replace(/=([0-9A-F]{2})/g, (_, hex: string) => String.fromCharCode(parseInt(hex, 16)));
	return Buffer.from(bytes, 'latin1').toString('utf8');
}
