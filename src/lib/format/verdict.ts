import type { Verdict } from '../schemas/verdicts';

export { VERDICTS, type Verdict } from '../schemas/verdicts';

const WORDS: Record<Verdict, string> = {
	'rides-it-out': 'Rides it out',
	'runs-close': 'Runs close',
	'cuts-out': 'Cuts out'
};

/** The verdict as a heading: "Cuts out". */
export const formatVerdict = (verdict: Verdict): string => WORDS[verdict];

/** The verdict inside a line: "cuts out". */
export const sayVerdict = (verdict: Verdict): string => WORDS[verdict].toLowerCase();
