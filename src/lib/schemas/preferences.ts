import { z } from 'zod';

/** What a person may choose without an account; kept in one cookie. */
export const preferencesSchema = z.object({
	theme: z.enum(['system', 'light', 'dark']).default('system'),
	numbers: z.enum(['iso', 'universal', 'palmer']).default('iso')
});

export type Preferences = z.infer<typeof preferencesSchema>;
