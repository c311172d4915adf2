import { RateLimiterMemory, RateLimiterRes } from 'rate-limiter-flexible';

/**
 * Counts attempts and says how long to wait once there were too many. It slows guessing down and locks nobody out: the count is kept in
 * memory, forgets after its window, and what belongs to one person's own browser is counted apart from what strangers try.
 *
 * @internal for its test
 */
export class AttemptLimit {
	private readonly limiter: RateLimiterMemory;

	/**
	 * @param attempts so many within a window
	 * @param windowSeconds its length
	 */
	constructor(attempts: number, windowSeconds: number) {
		this.limiter = new RateLimiterMemory({ points: attempts, duration: windowSeconds });
	}

	/**
	 * Counts an attempt before it is made, so that many at once cannot slip through.
	 * @returns seconds to wait; 0 if it may be made
	 */
	async take(key: string): Promise<number> {
		try {
			await this.limiter.consume(key);
			return 0;
		} catch (refused) {
			if (!(refused instanceof RateLimiterRes)) throw refused;
			return Math.max(1, Math.ceil(refused.msBeforeNext / 1000));
		}
	}

	/** Gives an attempt back that turned out to be rightful. */
	async giveBack(key: string): Promise<void> {
		await this.limiter.reward(key);
	}

	/** Forgets every attempt of a key. */
	async forget(key: string): Promise<void> {
		await this.limiter.delete(key);
	}
}

const QUARTER_HOUR_SECONDS = 900;
const HOUR_SECONDS = 3600;

/**
 * Sign-in. A browser that has signed in to the account before has a count of its own, so that strangers who try the account's password
 * cannot keep its owner out (OWASP's "device cookie"). Owners on a new device while that goes on have the reset by mail.
 */
export const signInLimits = {
	/** One address at one account. */
	pair: new AttemptLimit(10, QUARTER_HOUR_SECONDS),
	/** One address at any account: a whole school may stand behind one. */
	address: new AttemptLimit(200, QUARTER_HOUR_SECONDS),
	/** One account from anywhere, browsers it does not know. */
	account: new AttemptLimit(100, QUARTER_HOUR_SECONDS),
	/** One browser the account knows. */
	device: new AttemptLimit(20, QUARTER_HOUR_SECONDS)
};

/** Codes of the second factor, an account: a million codes, three of them right at a time. */
export const codeLimit = new AttemptLimit(10, QUARTER_HOUR_SECONDS);

/** Requests for a reset: mails to one account, and requests of one address. */
export const resetLimits = {
	account: new AttemptLimit(5, HOUR_SECONDS),
	address: new AttemptLimit(30, HOUR_SECONDS)
};

/** Links opened by one address: invitations, resets, set-up, confirmations. */
export const linkLimit = new AttemptLimit(60, QUARTER_HOUR_SECONDS);

/** Invitations, resent ones too, that one administrator sends. */
export const invitationLimit = new AttemptLimit(300, HOUR_SECONDS);

/** Own password asked again by a signed-in person. */
export const ownPasswordLimit = new AttemptLimit(20, QUARTER_HOUR_SECONDS);

/** Confirmation mails to new addresses that one person asks for. */
export const emailChangeLimit = new AttemptLimit(5, HOUR_SECONDS);
