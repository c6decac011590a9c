import type { Connection } from '../db/database';
import type { Storage } from '../storage/storage';

/** What a use case that touches files is given. */
export interface Stores {
	readonly db: Connection;
	readonly storage: Storage;
}
