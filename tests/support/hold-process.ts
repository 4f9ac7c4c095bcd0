import { connection } from '../../src/lib/server/db/connection';
import { initModels } from '../../src/lib/server/db/models';
import { shareHeld, startHolding } from '../../src/lib/server/services/accuracy/hold-waiting';

// Another process that holds traces of the database that its environment names, and dies amid the one that it is given.
const traceId = Number(process.argv[2]);
initModels(connection());
startHolding();
const look = (): void => {
	if (shareHeld(traceId) > 0) process.kill(process.pid, 'SIGKILL');
	setImmediate(look);
};
look();
