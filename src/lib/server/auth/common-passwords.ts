/**
 * Passwords and parts of passwords that stand at the top of every published count, from memory; nobody's list is copied.
 * They are shorter than a password must be here: what is refused is one that is made of nothing else.
 */
const COMMON = `
password passwort passw0rd p@ssw0rd pass word admin administrator root user guest login letmein welcome changeme default secret
master access open test temp demo qwerty qwertyuiop qwertz azerty asdf asdfgh asdfghjkl zxcv zxcvbn zxcvbnm 1q2w3e 1q2w3e4r 1q2w3e4r5t
qazwsx qazwsxedc 1qaz2wsx 3edc4rfv abc abcd abcde abcdef abcdefgh abc123 iloveyou love lover princess sunshine monkey dragon football
baseball basketball soccer hockey superman batman spiderman starwars pokemon shadow michael jordan jessica ashley charlie thomas
daniel andrew joshua george hunter ranger buster tigger ginger pepper cookie summer winter spring autumn monday friday january
december flower purple orange banana cheese chocolate computer internet google facebook whatever trustno1 killer freedom mustang
corvette harley ferrari hello hallo bonjour hola mother father family angel jesus heaven lovely babygirl money samsung liverpool
arsenal chelsea manchester australia england london america battery batteries workshop garage soakline
`
	.split(/\s+/)
	.filter(Boolean);
const WORDS = new Set(COMMON);
const KEYS = ['01234567890', 'abcdefghijklmnopqrstuvwxyz', 'qwertyuiop', 'asdfghjkl', 'zxcvbnm'];
const RUNS = [...KEYS, ...KEYS.map((keys) => [...keys].reverse().join(''))];
const SHORTEST_RUN = 3;

const isRun = (part: string): boolean =>
	part.length >= SHORTEST_RUN && (/^(.)\1+$/.test(part) || RUNS.some((run) => run.includes(part)));
const isYear = (part: string): boolean => /^(19|20)\d\d$/.test(part);

/** Whether a text is made of common words, runs of keys and years alone, whatever stands between them. */
function isMadeOfCommon(text: string): boolean {
	const reached = new Set([0]);
	for (let end = 1; end <= text.length; end++) {
		for (let start = 0; start < end; start++) {
			if (!reached.has(start)) continue;
			const part = text.slice(start, end);
			const isFiller = part.length === 1 && /[^a-z]/.test(part);
			if (isFiller || WORDS.has(part) || isRun(part) || isYear(part)) reached.add(end);
		}
	}
	return reached.has(text.length);
}

/** One that is short and said again and again: "trampoline" twice is no longer than once. */
function isRepeated(text: string): boolean {
	const again = (text + text).indexOf(text, 1);
	return again < text.length && again <= SHORTEST_RUN * 2;
}

/** Whether a password is among those that are tried first: common words, or the person's own names, and nothing else. */
export function isCommonPassword(password: string, own: readonly string[] = []): boolean {
	const text = password.toLowerCase();
	const names = own
		.flatMap((each) => each.toLowerCase().split(/[^a-z0-9]+/))
		.filter((each) => each.length > 2);
	const without = names.reduce((rest, name) => rest.replaceAll(name, '1'), text);
	return isRepeated(text) || isMadeOfCommon(without);
}
