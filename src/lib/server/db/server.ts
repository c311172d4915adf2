import type { Sequelize } from 'sequelize';
import { environment } from '../config';
import { database } from './index';

/** The running server's connection. */
export const serverDatabase = (): Promise<Sequelize> => database(environment.DATA_DIR);
