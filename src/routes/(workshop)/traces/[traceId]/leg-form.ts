import { editLegs, type LegEdit } from '$lib/format/trace-legs';
import { readHour } from '$lib/format/trace-mapping-form';
import type { LegsInput } from '$lib/schemas/traces';
import type { LegState, TraceLeg } from '$lib/thermal/traces';

const MINUTE_S = 60;
const isKind = (kind: unknown): kind is LegState => kind === 'driving' || kind === 'stopped';

/** What the button of the form asks for besides saving: "split:2", "join:0". */
function editOf(button: string): LegEdit | null {
	const [, kind, at] = /^(split|join):(\d{1,4})$/.exec(button) ?? [];
	return kind ? { kind: kind as 'split' | 'join', at: Number(at) } : null;
}

/** The legs of the boxes: kinds, and ends in minutes from the start of the trace; what is no number becomes NaN. */
function readLegs(sent: FormData, startS: number): LegsInput {
	const legs: LegsInput = [];
	for (let at = 0; sent.has(`legs.${at}.endMin`); at++) {
		const text = String(sent.get(`legs.${at}.endMin`))
			.trim()
			.replace(',', '.');
		const endS = startS + Math.round(text === '' ? NaN : Number(text)) * MINUTE_S;
		const kind = sent.get(`legs.${at}.kind`);
		const speedKmh = readNumber(String(sent.get(`legs.${at}.speedKmh`) ?? '')) as number | null;
		legs.push({ endS, kind: isKind(kind) ? kind : 'stopped', speedKmh });
	}
	return legs;
}

/** A number as it was typed, null for an empty box; what is no number stays as it is, for the schema to refuse. */
function readNumber(text: string): number | string | null {
	const plain = text.trim().replace(',', '.');
	if (plain === '') return null;
	return Number.isFinite(Number(plain)) ? Number(plain) : text;
}

/** What a form about legs asks for, without a script or with one. */
export function readLegsForm(sent: FormData, known: readonly TraceLeg[]): unknown {
	const startS = known[0]!.startS;
	const legs = readLegs(sent, startS);
	const edit = editOf(String(sent.get('do') ?? ''));
	const whole = legs.map(({ endS, kind, speedKmh = null }, at) => ({
		...{ startS: at === 0 ? startS : legs[at - 1]!.endS, endS, kind },
		...{ meanSpeedKmh: speedKmh, why: '' }
	}));
	const isSound = whole.every((leg) => leg.endS - leg.startS >= MINUTE_S);
	const edited = edit && isSound ? editLegs(whole, edit) : whole;
	const hour = sent.get('startHour');
	const startHour = hour === null ? undefined : readHour(String(hour));
	return {
		legs: edited.map(({ endS, kind, meanSpeedKmh: speedKmh }) => ({ endS, kind, speedKmh })),
		...(startHour === undefined ? {} : { startHour }),
		version: sent.get('version')
	};
}
