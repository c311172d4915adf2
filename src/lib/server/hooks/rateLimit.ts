import type { Handle } from '@sveltejs/kit';
import { RateLimiterMemory, RateLimiterRes } from 'rate-limiter-flexible';
import { Problem, problemResponse } from '../api/problem';
import { environment } from '../config';
import { isApi } from './apiProblems';

const limiter = new RateLimiterMemory({ points: environment.RATE_LIMIT_PER_MINUTE, duration: 60 });

/** Limits requests a minute from one address. /health is left out: a supervisor must always get its answer. */
export const rateLimit: Handle = async ({ event, resolve }) => {
	if (event.url.pathname === '/health' || event.url.pathname === '/api/v1/health') return resolve(event);
	try {
		await limiter.consume(event.getClientAddress());
	} catch (refused) {
		if (!(refused instanceof RateLimiterRes)) throw refused;
		const seconds = String(Math.max(1, Math.ceil(refused.msBeforeNext / 1000)));
		const problem = new Problem(429, `Too many requests. Try again in ${seconds} s.`, [], {
			'retry-after': seconds
		});
		if (isApi(event.url.pathname)) return problemResponse(problem);
		return new Response(problem.detail, { status: 429, headers: { 'retry-after': seconds } });
	}
	return resolve(event);
};
