import { log } from '../log';
import { deliverDue, onMail, takeUpInterrupted } from './queue';
import { mailDelivery, type Deliver } from './transport';

/** The queue is looked at again after this at the latest: the clock may have been set meanwhile. */
const LONGEST_SLEEP_MS = 60_000;

/** Sends what is in the queue, when it is due, until it is stopped. One message at a time. @internal for its test */
export class Mailer {
	private running: Promise<void> | null = null;
	private again = false;
	private timer: NodeJS.Timeout | undefined;
	private stopped = false;

	constructor(private readonly deliver: Deliver) {}

	/** Looks at the queue now. */
	wake = (): void => {
		if (this.stopped) return;
		if (this.running) {
			this.again = true;
			return;
		}
		clearTimeout(this.timer);
		this.running = this.run().finally(() => {
			this.running = null;
			// Woken after the last look at the queue and before this.
			if (this.again) this.wake();
		});
	};

	/** Lets the message in hand go out, and sends no other. */
	async stop(): Promise<void> {
		this.stopped = true;
		clearTimeout(this.timer);
		await this.running;
	}

	private async run(): Promise<void> {
		let next: string | null;
		do {
			this.again = false;
			try {
				next = await deliverDue(this.deliver, () => !this.stopped);
			} catch (error) {
				log.error({ err: error }, 'the mail queue could not be read');
				next = new Date(Date.now() + LONGEST_SLEEP_MS).toISOString();
			}
		} while (this.again && !this.stopped);
		if (this.stopped || next === null) return;
		const sleep = Math.min(Math.max(Date.parse(next) - Date.now(), 0), LONGEST_SLEEP_MS);
		this.timer = setTimeout(this.wake, sleep);
		this.timer.unref();
	}
}

let mailer: Mailer | undefined;

/** Starts sending, where the environment says whither. */
export async function startMailer(): Promise<void> {
	const deliver = mailDelivery();
	const interrupted = await takeUpInterrupted();
	if (interrupted > 0)
		log.warn({ mails: interrupted }, 'mails that were being sent when the server ended are sent again');
	if (!deliver) {
		log.warn('SMTP_URL is not set: no mail goes out, links have to be copied by hand');
		return;
	}
	mailer = new Mailer(deliver);
	onMail(mailer.wake);
	mailer.wake();
}

/** Stops sending. */
export const stopMailer = async (): Promise<void> => mailer?.stop();
