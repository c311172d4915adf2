import path from 'node:path';
import { environment } from '../config';
import { diskStore } from './disk';
import type { Store } from './store';

/** Folder of uploads below DATA_DIR; backups take it whole. */
const UPLOADS_FOLDER = 'uploads';

/** The storage of this server. Asked for anew each time: tests move DATA_DIR. */
export const storage = (): Store => diskStore(path.join(environment.DATA_DIR, UPLOADS_FOLDER));
