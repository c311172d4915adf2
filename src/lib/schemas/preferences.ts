import { z } from 'zod';

/** What a person may choose without an account; kept in one cookie. */
export const preferencesSchema = z.object({
	theme: z.enum(['system', 'light', 'dark']).default('system'),
	numbers: z.enum(['iso', 'universal', 'palmer']).default('iso'),
	/** How probabilities and their ranges are written. */
	units: z.enum(['percent', 'in-100']).default('percent')
});

export type Preferences = z.infer<typeof preferencesSchema>;
