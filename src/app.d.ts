import type { Asking } from '$lib/server/auth/requirePermission';
import type { Sessions } from '$lib/server/auth/sessions';
import type { SignInAttempts } from '$lib/server/auth/signInAttempts';
import type { Changes } from '$lib/server/work/changes';
import type { AuditHead } from '$lib/server/db/verifyAuditChain';
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
			sessions: Sessions;
			signInAttempts: SignInAttempts;
			changes: Changes;
			/** The largest measurement file that is taken, in bytes. */
			uploadLimit: number;
			isDemo: boolean;
			/** The newest audit row as it is known outside the database. */
			auditHead: () => Promise<AuditHead | undefined>;
			sessionId: string | null;
			requestId: string;
			log: Log;
		}
	}
}

export {};
