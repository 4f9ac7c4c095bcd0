import type { AuditRow } from '$lib/schemas/audit';
import type { AuditEntry } from '../db/models';

const NOBODY = 'a customer or the program';

/** What each action is called: what somebody did, so that it reads on from their name. */
export const DID = {
	'assessment.made': 'assessed a mount',
	'battery.changed': 'changed a battery',
	'battery.created': 'added a battery',
	'book.changed': 'changed a value of a draft book',
	'book.drafted': 'began a draft of a coefficient book',
	'book.in-force': 'put a coefficient book in force',
	'rerun.begun': 'let assessments be made again',
	'rerun.cancelled': 'stopped assessments from being made again',
	'rerun.running': 'let assessments be made again go on',
	'rerun.told': 'told a customer of a changed verdict',
	'assessment.made-again': 'had an assessment made again with another book',
	'book.on-trial': 'put a coefficient book on trial',
	'book.withdrawn': 'withdrew a coefficient book',
	'customer.admitted': 'asked for the first time to sign in as a customer',
	'customer.changed': 'changed a customer',
	'customer.created': 'added a customer',
	'customer.data-taken': 'took what is held about them',
	'customer.erased': 'had a customer’s data deleted',
	'customer.erasure-asked': 'asked for deletion',
	'customer.erasure-refused': 'refused a request for deletion',
	'customer.erasure-withdrawn': 'took back their request for deletion',
	'customer.reminders-stopped': 'stopped the reminders',
	'customer.reminders-wanted': 'wanted the reminders again',
	'day-plan.changed': 'changed a day plan',
	'day-plan.drawn': 'drew a day plan',
	'fit.begun': 'began to fit coefficients to traces',
	'fit.cancelled': 'called a fit off',
	'fit.done': 'had a fit worked out',
	'fit.drafted': 'began a draft book with the values of a fit',
	'fit.failed': 'had a fit tried that could not be made',
	'invitation.sent-again': 'sent an invitation again',
	'invitation.withdrawn': 'withdrew an invitation',
	'job.answer': 'answered a customer’s question',
	'job.battery-set': 'chose the battery of a job',
	'job.climate-set': 'chose the climate of a job',
	'job.created': 'began a job',
	'job.letter-arrived': 'noted that a letter arrived',
	'job.letter-tried-again': 'sent a letter again',
	'mount.added': 'added a mount',
	'mount.cable': 'changed the proposed cable',
	'mount.field-note': 'kept a field note',
	'mount.field-note-struck': 'struck a field note out',
	'mount.file-added': 'added a photo or document',
	'mount.file-changed': 'changed what is said of a photo',
	'mount.file-removed': 'removed a photo or document',
	'mount.file-restored': 'put a photo or document back',
	'mount.fitted': 'said what was fitted',
	'mount.fitting-held': 'held what was fitted against another recommendation',
	'mount.follow-up': 'looked at a battery again',
	'mount.pre-drill': 'answered the check before drilling',
	'mount.pre-drill-signed': 'signed the check before drilling',
	'mount.removed': 'removed a mount',
	'mount.restored': 'put a mount back',
	'mount.surveyed': 'surveyed a mount',
	'own-zone.changed': 'changed a zone of the shop’s own',
	'own-zone.created': 'added a zone of the shop’s own',
	'own-zone.removed': 'removed a zone of the shop’s own',
	'person.came-back': 'brought somebody back',
	'person.invited': 'invited somebody',
	'person.joined': 'joined the workshop',
	'person.left': 'ended somebody’s access',
	'person.role-changed': 'gave somebody another role',
	'person.signed-in': 'signed in',
	'person.signed-out': 'signed out',
	'place.changed': 'changed a place',
	'place.created': 'added a place',
	'place.weather-put-back': 'put a place’s weather back',
	'place.weather-taken': 'took a weather file for a place',
	'recommendation.made': 'recommended a mount',
	'remedies.changed': 'changed remedies and prices',
	'second-factor.codes-renewed': 'made new recovery codes',
	'second-factor.recovery-code-used': 'signed in with a recovery code',
	'second-factor.reset': 'reset somebody’s second factor',
	'second-factor.turned-off': 'turned their second factor off',
	'second-factor.turned-on': 'turned their second factor on',
	'sheet.acknowledged': 'acknowledged a customer’s page',
	'sheet.letter-tried-again': 'sent a letter again',
	'sheet.link-opened': 'opened a customer’s page by its link',
	'sheet.question': 'asked a question on the page',
	'sheet.read': 'read a customer’s page',
	'sheet.sent': 'sent a customer’s page',
	'sheet.withdrawn': 'withdrew a customer’s page',
	'shop.cautions-changed': 'changed the shop’s cautions',
	'shop.changed': 'changed the shop’s details',
	'shop.logo-changed': 'changed the shop’s logo',
	'shop.logo-removed': 'took the shop’s logo away',
	'trace.added': 'sent a logger’s file',
	'trace.legs-set': 'set the legs of a trace',
	'trace.mapped': 'said what the columns of a trace are',
	'trace.not-read': 'had a trace looked at that could not be read',
	'trace.read': 'had a trace read',
	'trace.removed': 'removed a trace',
	'trace.restored': 'put a trace back',
	'shop.retention-changed': 'changed how long customers’ data are kept',
	'shop.second-factor-rule': 'changed whether a second factor is asked for',
	'vehicle.changed': 'changed a vehicle',
	'vehicle.created': 'added a vehicle'
} as const satisfies Record<string, string>;
/** All that is ever recorded: what is not here has no words, and the types refuse it. */
export type AuditAction = keyof typeof DID;

/** An action of an earlier edition that is not here any more is read out by its own words. */
export const sayAction = (action: string): string =>
	action in DID ? DID[action as AuditAction] : action.replace(/[.-]/g, ' ');

/** The actions in whose plain words a word stands. */
export const actionsSaying = (word: string): string[] =>
	Object.entries(DID)
		.filter(([, words]) => words.toLowerCase().includes(word.toLowerCase()))
		.map(([action]) => action);

const PAGES: Record<string, (id: number) => string> = {
	assessment: (id) => `/assessments/${id}`,
	battery: (id) => `/batteries/${id}`,
	book: (id) => `/books/${id}`,
	job: (id) => `/jobs/${id}`,
	mount: (id) => `/mounts/${id}`,
	place: (id) => `/places/${id}`,
	recommendation: (id) => `/recommendations/${id}/print`
};

/** "hotDayMaxC" as "hot day max C". */
const sayKey = (key: string): string =>
	key.replace(/([a-z0-9])([A-Z])/g, '$1 $2').replace(/[A-Z](?=[a-z])/g, (sign) => sign.toLowerCase());

function sayValue(value: unknown): string {
	if (value === null || value === undefined || value === '') return 'nothing';
	if (value === true) return 'yes';
	if (value === false) return 'no';
	if (Array.isArray(value)) return value.length === 0 ? 'none' : value.map(sayValue).join(', ');
	if (typeof value === 'object') {
		return Object.entries(value)
			.map(([key, inner]) => `${sayKey(key)} ${sayValue(inner)}`)
			.join('; ');
	}
	return String(value as string | number);
}

type Names = ReadonlyMap<number, string>;
/** Of those who did things, and of those to whom they were done, by what they are. */
export interface AuditNames {
	person: Names;
	customer: Names;
	/** The number that a subject has for the people of the workshop. */
	numberOf: (type: string, id: number) => number;
	/** Of the people, those who work or worked in the shop: customers who sign in have no page. */
	staff: ReadonlySet<number>;
	/** The zones of the shop's own that there still are. */
	zones: ReadonlySet<number>;
}

const nameOfSubject = (type: string, id: number, names: AuditNames): string | null =>
	(type === 'person' || type === 'customer' ? names[type].get(id) : undefined) ?? null;

/** The page of a subject, where there is one. */
function pageOf(type: string, id: number, { staff, zones }: AuditNames): string | null {
	if (type === 'person') return staff.has(id) ? `/people/${id}` : null;
	if (type === 'own-zone') return zones.has(id) ? `/review/zones/${id}` : null;
	return PAGES[type]?.(id) ?? null;
}

export function presentAuditEntry(entry: AuditEntry, names: AuditNames): AuditRow {
	const { sequence, at, personId, action, subjectType, subjectId, detail } = entry;
	return {
		...{ sequence, action, subjectId },
		at: at.toISOString(),
		who: personId === null ? NOBODY : (names.person.get(personId) ?? `person ${personId}`),
		did: sayAction(action),
		subject: subjectType,
		subjectNumber: names.numberOf(subjectType, subjectId),
		subjectName: nameOfSubject(subjectType, subjectId, names),
		href: pageOf(subjectType, subjectId, names),
		detail: Object.entries(detail).map(([key, value]) => ({ label: sayKey(key), value: sayValue(value) }))
	};
}
