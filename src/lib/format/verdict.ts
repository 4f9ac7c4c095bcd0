export const VERDICTS = ['rides-it-out', 'runs-close', 'cuts-out'] as const;
export type Verdict = (typeof VERDICTS)[number];

const WORDS: Record<Verdict, string> = {
	'rides-it-out': 'Rides it out',
	'runs-close': 'Runs close',
	'cuts-out': 'Cuts out'
};

/** The verdict as a heading: "Cuts out". */
export const formatVerdict = (verdict: Verdict): string => WORDS[verdict];

/** The verdict inside a line: "cuts out". */
export const sayVerdict = (verdict: Verdict): string => WORDS[verdict].toLowerCase();
