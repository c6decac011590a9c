import type { Asking } from '$lib/server/auth/requirePermission';
import type { Connection } from '$lib/server/db/database';
import type { Log } from '$lib/server/logging';
import type { Storage } from '$lib/server/storage/storage';

declare global {
	namespace App {
		interface Error {
			message: string;
			requestId?: string;
		}
		interface Locals extends Asking {
			db: Connection;
			storage: Storage;
			sessionId: string | null;
			requestId: string;
			log: Log;
		}
	}
}

export {};
