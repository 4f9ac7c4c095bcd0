import { hasBms } from '../schemas/batteries';
import type { Verdict } from '../schemas/verdicts';

export { VERDICTS, type Verdict } from '../schemas/verdicts';

const WITH_BMS: Record<Verdict, string> = {
	'rides-it-out': 'Rides it out',
	'runs-close': 'Runs close',
	'cuts-out': 'Cuts out'
};
/** Nothing switches such a battery off: it goes on, hotter than it may be. */
const WITHOUT_BMS: Record<Verdict, string> = { ...WITH_BMS, 'cuts-out': 'Gets too hot' };

/** The verdict as a heading: "Cuts out", and of a chemistry without a BMS "Gets too hot". */
export const formatVerdict = (verdict: Verdict, chemistry = ''): string =>
	(hasBms(chemistry) ? WITH_BMS : WITHOUT_BMS)[verdict];

/** The verdict inside a line: "cuts out", "gets too hot". */
export const sayVerdict = (verdict: Verdict, chemistry = ''): string =>
	formatVerdict(verdict, chemistry).toLowerCase();
