/** The three verdicts, coolest first. Their words stand in format/. */
export const VERDICTS = ['rides-it-out', 'runs-close', 'cuts-out'] as const;
export type Verdict = (typeof VERDICTS)[number];
