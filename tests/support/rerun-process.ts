import { connection } from '../../src/lib/server/db/connection';
import { initModels } from '../../src/lib/server/db/models';
import { finishReruns } from '../../src/lib/server/services/reruns/run-reruns';

// Another process at work on the re-runs of the database that its environment names, for a test to kill.
initModels(connection());
await finishReruns();
process.exit(0);
