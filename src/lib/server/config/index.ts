import { readEnvironment } from './environment.js';

const result = readEnvironment(process.env);
if ('mistakes' in result) throw new Error(`The environment is not usable. ${result.mistakes.join(' ')}`);

/** The validated environment of this process. */
export const environment = result.environment;
