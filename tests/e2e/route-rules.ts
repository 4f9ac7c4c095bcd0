/**
 * Who stands before a page or an endpoint. The neighbour is the manager of another workshop, the other customer is of
 * the same workshop as the customer whose page, papers and vehicle are asked for.
 */
export const VISITORS = [
	...(['nobody', 'installer', 'engineer', 'manager', 'customer', 'other customer', 'neighbour'] as const)
] as const;
/** For them the records of the test are somebody else’s. */
const STRANGERS: readonly Visitor[] = ['neighbour', 'other customer'];
export type Visitor = (typeof VISITORS)[number];

/** Whose a route is. `anyone` needs no sign-in; what a link opens is held by its token. */
type Audience = 'anyone' | 'workshop' | 'bench' | 'manager' | 'customer';

export interface RouteRule {
	/** As in the folder of routes, without the groups in brackets. */
	route: string;
	for: Audience;
	/** Names one workshop's record: for everybody else there is no such thing. */
	owned?: true;
	/** What the route exports, or the names of its form actions. */
	methods: readonly string[];
	/** A good answer is a redirect to where the work is. */
	leadsOn?: true;
	/** A method that is answered with a conflict by whoever is let in, where there is nothing yet that it could change. */
	nothingFor?: string;
	/** Methods that fewer may use than the route is open to. */
	only?: Readonly<Record<string, Audience>>;
	/** A body that the schema lets through, so that only ownership can refuse. */
	bodies?: Readonly<Record<string, unknown>>;
}

const PLACE = {
	...{ name: 'Nowhere', region: '', latitudeDeg: 0, longitudeDeg: 0, altitudeM: 0, climateZone: 'BWh' },
	...{ hotDayMaxC: 40, dailyRangeK: 15, sunPeakWPerM2: 1000, source: 'Invented for this test', version: 0 }
};
const BATTERY = {
	...{ maker: 'Nobody', model: 'None', chemistry: 'lithium-iron-phosphate', capacityAh: 100, massKg: 12 },
	...{
		lengthMm: 300,
		widthMm: 170,
		heightMm: 210,
		internalResistanceMohm: 10,
		maxChargeA: 50,
		sensor: 'cells'
	},
	...{
		chargeCutC: 60,
		chargeResetC: 50,
		dischargeCutC: 75,
		dischargeResetC: 62,
		cutDelayS: 0,
		autoReset: true
	},
	...{ underBonnet: 'silent', version: 0 }
};
const VEHICLE = {
	...{ make: 'None', model: 'None', modelYear: 2020, engineLayout: 'inline', massKg: 2000, dragAreaM2: 1 },
	...{ towMassKg: 0, towDragAreaM2: 0, version: 0 }
};
const LEG = {
	...{ kind: 'stop', minutes: 60, speedKmh: 0, surface: 'sealed', gradePercent: 0, towing: false },
	...{ engineOn: false, bonnetOpen: false, loadA: 0 }
};
const DAY = { name: 'None', startHour: 7, startSoc: 0.5, chargerMaxA: 40, legs: [LEG], version: null };
const CLIMATE = { placeId: 1, hotDayMaxC: 40, dailyRangeK: 15, sunPeakWPerM2: 1000, version: 0 };
const SURVEY = { survey: { positionKind: 'cabin' }, complete: false, version: 0 };
const FITTING = { fittedOn: '2026-01-05', fittedBy: 'Nobody', differences: [], version: null };
const OWN_ZONE = { name: 'None', position: 1, rule: 'latitude', fromValue: 0, toValue: 1, version: 0 };
const MAPPING = {
	...{ version: 1, delimiter: ',', decimal: '.', time: { kind: 'elapsed-s', column: 1 } },
	columns: [{ column: 2, channel: 'cellC', unit: '°C' }]
};
const STRIKE = { reason: 'Nothing of it holds' };
const FIELD_NOTE = { kind: 'inspection', notedOn: '2026-01-06', words: 'Nothing' };

const page = (route: string, audience: Audience, ...methods: string[]): RouteRule => ({
	route,
	for: audience,
	methods: ['GET', ...methods]
});
const owned = (route: string, audience: Audience, ...methods: string[]): RouteRule => ({
	...page(route, audience, ...methods),
	owned: true
});
const api = (route: string, audience: Audience, ...methods: string[]): RouteRule => ({
	route: `/api/v1${route}`,
	for: audience,
	methods
});
const ownedApi = (route: string, audience: Audience, bodies: Record<string, unknown>): RouteRule => ({
	...api(route, audience, ...Object.keys(bodies)),
	owned: true,
	bodies
});

/** Every route and what it takes; a route that is not here, or takes something else, fails a test. */
export const ROUTE_RULES: readonly RouteRule[] = [
	{ ...page('/', 'anyone'), leadsOn: true },
	page('/healthz', 'anyone'),
	page('/readyz', 'anyone'),
	page('/sign-in', 'anyone', 'password', 'link'),
	page('/sign-in/link/[token]', 'anyone', 'default'),
	page('/sign-in/second-step', 'anyone', 'default'),
	page('/sign-in/invitation/[token]', 'anyone', 'default'),
	{ ...page('/sign-out', 'anyone', 'default'), leadsOn: true },
	page('/sheet/[token]', 'anyone', 'acknowledge', 'ask', 'send'),

	page('/reminders/[stop]', 'anyone', 'default'),

	page('/jobs', 'workshop'),
	page('/jobs/new', 'workshop', 'create', 'repeat'),
	owned('/jobs/[jobId]', 'workshop', 'assess', 'answer', 'again', 'arrived'),
	owned('/jobs/[jobId]/customer', 'workshop', 'default'),
	owned('/jobs/[jobId]/vehicle', 'workshop', 'default'),
	owned('/jobs/[jobId]/battery', 'workshop', 'default'),
	owned('/jobs/[jobId]/climate', 'workshop', 'default'),
	owned('/jobs/[jobId]/day', 'workshop', 'default'),
	owned('/jobs/[jobId]/mounts/new', 'workshop', 'default'),
	owned('/jobs/[jobId]/compare', 'workshop', 'default'),
	owned('/jobs/[jobId]/recommendation', 'workshop', 'default'),
	owned('/jobs/[jobId]/sheets', 'workshop', 'send', 'withdraw', 'retry'),
	{ ...owned('/mounts/[mountId]', 'workshop', 'remove', 'restore'), leadsOn: true },
	{ ...owned('/mounts/[mountId]/survey', 'workshop'), leadsOn: true },
	owned('/mounts/[mountId]/survey/[step]', 'workshop', 'default'),
	owned('/mounts/[mountId]/survey/check', 'workshop', 'default'),
	owned('/mounts/[mountId]/cable', 'workshop', 'save', 'takeBack'),
	owned('/mounts/[mountId]/pre-drill', 'workshop', 'save', 'sign'),
	owned('/mounts/[mountId]/fitted', 'workshop', 'save', 'hold', 'done'),
	owned('/mounts/[mountId]/photos', 'workshop', 'add', 'caption', 'picture', 'remove', 'restore'),
	owned('/mounts/[mountId]/follow-ups.ics', 'workshop'),
	owned('/mounts/[mountId]/field', 'workshop'),
	owned('/mounts/[mountId]/field/new/[kind]', 'workshop', 'default'),
	owned('/mounts/[mountId]/field/[noteId]/strike', 'workshop', 'default'),
	owned('/assessments/[assessmentId]', 'workshop', 'again', 'others', 'reproduce'),
	owned('/assessments/[assessmentId]/outlook-progress', 'workshop'),
	owned('/recommendations/[recommendationId]/print', 'workshop'),
	owned('/recommendations/[recommendationId]/recommendation.pdf', 'workshop'),
	owned('/mounts/[mountId]/[paper=paper]/print', 'workshop'),
	owned('/mounts/[mountId]/[paper=paper].pdf', 'workshop'),
	page('/batteries', 'workshop'),
	page('/batteries/new', 'workshop', 'default'),
	owned('/batteries/[batteryId]', 'workshop', 'default'),
	{ ...page('/remedies', 'workshop', 'default'), only: { default: 'bench' } },
	page('/places', 'workshop'),
	page('/places/new', 'workshop', 'default'),
	owned('/places/[placeId]', 'workshop', 'default'),
	owned('/places/[placeId]/weather', 'workshop', 'read', 'take', 'putBack'),
	page('/books', 'bench'),
	page('/books/new', 'bench', 'default'),
	owned('/books/[bookId]', 'bench', 'move'),
	owned('/books/[bookId]/[coefficient=coefficient]', 'bench', 'default'),
	owned('/books/[bookId]/against/[otherId]', 'bench'),
	page('/accuracy', 'bench'),
	page('/accuracy/progress', 'bench'),
	page('/accuracy/readings.csv', 'bench'),
	page('/reruns', 'bench'),
	owned('/reruns/[rerunId]', 'bench', 'move'),
	owned('/reruns/[rerunId]/progress', 'bench'),
	owned('/reruns/[rerunId]/[itemId]', 'bench', 'letter', 'otherwise'),
	page('/fits', 'bench'),
	page('/fits/new', 'bench', 'default'),
	owned('/fits/[fitId]', 'bench', 'cancel', 'draft'),
	owned('/fits/[fitId]/progress', 'bench'),
	page('/traces', 'bench'),
	owned('/traces/[traceId]', 'bench', 'read', 'legs', 'plan', 'remove'),
	owned('/traces/[traceId]/progress', 'bench'),
	owned('/traces/[traceId]/held-progress', 'bench'),
	owned('/mounts/[mountId]/traces', 'bench', 'add', 'restore'),
	page('/people', 'manager', 'invite', 'again', 'withdraw'),
	owned('/people/[personId]', 'manager', 'role', 'resetFactor', 'leave', 'comeBack'),
	{ ...page('/second-factor', 'workshop', 'begin', 'confirm', 'renew', 'off'), leadsOn: true },
	{ ...page('/shop', 'manager', 'details', 'logo', 'removeLogo', 'secondFactor'), leadsOn: true },
	{ ...page('/audit', 'manager', 'check'), leadsOn: true },
	page('/audit/audit.csv', 'manager'),
	page('/shop/cautions', 'manager', 'default'),
	page('/shop/retention', 'manager', 'default'),
	page('/shop/letters', 'manager', 'again', 'arrived'),
	page('/review', 'manager'),
	page('/review/installations', 'manager'),
	page('/review/installations.csv', 'manager'),
	page('/review/map', 'manager'),
	page('/review/months', 'manager'),
	page('/review/zones', 'manager'),
	page('/review/zones/new', 'manager', 'default'),
	owned('/review/zones/[zoneId]', 'manager', 'save', 'remove'),
	page('/mailbox', 'workshop'),
	owned('/mailbox/[messageId]', 'workshop'),

	page('/erasures', 'manager', 'default'),

	page('/my', 'customer'),
	{ ...page('/my/data', 'customer', 'ask', 'withdraw'), nothingFor: 'withdraw' },
	page('/my/data.zip', 'customer'),
	owned('/my/[sheetId]', 'customer', 'acknowledge', 'ask', 'send'),
	owned('/my/handover/[mountId].pdf', 'customer'),
	owned('/my/recommendation/[recommendationId].pdf', 'customer'),

	api('/openapi.json', 'anyone', 'GET'),
	api('/places', 'workshop', 'GET', 'POST'),
	ownedApi('/places/[placeId]', 'workshop', { GET: null, PUT: PLACE }),
	ownedApi('/places/[placeId]/weather', 'workshop', { POST: null }),
	ownedApi('/places/[placeId]/weather/put-back', 'workshop', { POST: { version: 0 } }),
	api('/batteries', 'workshop', 'GET', 'POST'),
	ownedApi('/batteries/[batteryId]', 'workshop', { GET: null, PUT: BATTERY }),
	ownedApi('/customers/[customerId]', 'workshop', { GET: null, PUT: { name: 'Nobody', version: 0 } }),
	api('/vehicles', 'workshop', 'GET'),
	ownedApi('/vehicles/[vehicleId]', 'workshop', { GET: null, PUT: VEHICLE }),
	{ ...ownedApi('/vehicles/[vehicleId]/jobs', 'workshop', { POST: { note: '' } }) },
	api('/jobs', 'workshop', 'GET', 'POST'),
	ownedApi('/jobs/[jobId]', 'workshop', { GET: null }),
	ownedApi('/jobs/[jobId]/battery', 'workshop', { PUT: { batteryRecordId: 1, version: 0 } }),
	ownedApi('/jobs/[jobId]/climate', 'workshop', { PUT: CLIMATE }),
	ownedApi('/jobs/[jobId]/day-plan', 'workshop', { GET: null, PUT: DAY }),
	ownedApi('/jobs/[jobId]/mounts', 'workshop', { GET: null, POST: { name: 'None', positionKind: 'cabin' } }),
	ownedApi('/jobs/[jobId]/assessments', 'workshop', { GET: null, POST: null }),
	ownedApi('/jobs/[jobId]/sheets', 'workshop', {
		GET: null,
		POST: { recommendationId: 1, sendTo: 'nobody@shop.example' }
	}),
	ownedApi('/mounts/[mountId]', 'workshop', { GET: null, DELETE: null }),
	ownedApi('/mounts/[mountId]/restore', 'workshop', { POST: null }),
	ownedApi('/mounts/[mountId]/survey', 'workshop', { PUT: SURVEY }),
	ownedApi('/mounts/[mountId]/cable', 'workshop', { PUT: { cable: null, version: 0 } }),
	ownedApi('/mounts/[mountId]/pre-drill', 'workshop', { GET: null, PUT: { answers: {}, version: 0 } }),
	ownedApi('/mounts/[mountId]/fitting', 'workshop', { GET: null, PUT: FITTING }),
	ownedApi('/mounts/[mountId]/fitting/agreement', 'workshop', { PUT: { recommendationId: 1, version: 0 } }),
	ownedApi('/mounts/[mountId]/field-notes', 'workshop', { GET: null, POST: FIELD_NOTE }),
	ownedApi('/mounts/[mountId]/field-notes/[noteId]/strike', 'workshop', { POST: STRIKE }),
	ownedApi('/follow-ups/[followUpId]/done', 'workshop', { POST: { isDone: true, version: 0 } }),
	ownedApi('/mounts/[mountId]/files', 'workshop', { GET: null, POST: null }),
	ownedApi('/files/[fileId]', 'workshop', { GET: null, PATCH: { version: 0 }, DELETE: null }),
	ownedApi('/files/[fileId]/content', 'workshop', { GET: null }),
	ownedApi('/files/[fileId]/restore', 'workshop', { POST: null }),
	ownedApi('/mounts/[mountId]/pre-drill/signature', 'workshop', { PUT: { name: 'Nobody', version: 0 } }),
	{ ...api('/remedies', 'workshop', 'GET', 'PUT'), only: { PUT: 'bench' } },
	api('/assessments', 'workshop', 'POST'),
	ownedApi('/assessments/[assessmentId]/outlook', 'workshop', { GET: null }),
	ownedApi('/assessments/[assessmentId]', 'workshop', { GET: null }),
	ownedApi('/assessments/[assessmentId]/reproduction', 'workshop', { GET: null }),
	api('/recommendations', 'workshop', 'POST'),
	ownedApi('/recommendations/[recommendationId]', 'workshop', { GET: null }),
	ownedApi('/sheets/[sheetId]/withdrawal', 'workshop', { POST: null }),
	ownedApi('/sheets/[sheetId]/letter', 'workshop', { POST: null }),
	ownedApi('/jobs/[jobId]/letters', 'workshop', { GET: null }),
	api('/letters', 'manager', 'GET'),
	ownedApi('/letters/[letterId]/arrivals', 'workshop', { POST: null }),
	ownedApi('/letters/[letterId]/tries', 'workshop', { POST: null }),
	ownedApi('/jobs/[jobId]/questions', 'workshop', { GET: null }),
	ownedApi('/questions/[questionId]/answers', 'workshop', { POST: { answer: 'Nothing' } }),
	ownedApi('/my/sheets/[sheetId]/questions', 'customer', {
		GET: null,
		POST: { askedBy: 'Nobody', question: 'Nothing?' }
	}),
	api('/erasures', 'manager', 'GET'),
	ownedApi('/erasures/[erasureId]/decision', 'manager', {
		POST: { decision: 'refuse', reason: 'None', version: 0 }
	}),
	api('/my/data', 'customer', 'GET'),
	api('/my/erasure', 'customer', 'POST'),
	{ ...api('/my/erasure/withdrawal', 'customer', 'POST'), nothingFor: 'POST' },
	api('/books', 'bench', 'GET', 'POST'),
	ownedApi('/books/[bookId]', 'bench', { GET: null }),
	ownedApi('/books/[bookId]/state', 'bench', { PUT: { to: 'on-trial', version: 0 } }),
	ownedApi('/books/[bookId]/coefficients/[coefficient]', 'bench', {
		PUT: { value: 0.6, origin: 'judgement', source: 'None.', version: 0 }
	}),
	ownedApi('/books/[bookId]/against/[otherId]', 'bench', { GET: null }),
	api('/accuracy', 'bench', 'GET'),
	api('/accuracy/readings', 'bench', 'GET'),
	api('/reruns', 'bench', 'GET'),
	ownedApi('/reruns/[rerunId]', 'bench', { GET: null }),
	ownedApi('/reruns/[rerunId]/state', 'bench', { PUT: { to: 'cancelled' } }),
	ownedApi('/reruns/[rerunId]/changes', 'bench', { GET: null }),
	ownedApi('/reruns/[rerunId]/left', 'bench', { GET: null }),
	ownedApi('/reruns/[rerunId]/changes/[itemId]/telling', 'bench', { POST: { how: 'otherwise' } }),
	api('/fits', 'bench', 'GET', 'POST'),
	ownedApi('/fits/[fitId]', 'bench', { GET: null }),
	ownedApi('/fits/[fitId]/cancellation', 'bench', { POST: null }),
	ownedApi('/fits/[fitId]/book', 'bench', { POST: { name: 'None' } }),
	api('/traces', 'bench', 'GET'),
	ownedApi('/mounts/[mountId]/traces', 'bench', { GET: null, POST: null }),
	ownedApi('/traces/[traceId]', 'bench', { GET: null, DELETE: null }),
	ownedApi('/traces/[traceId]/mapping', 'bench', { PUT: { mapping: MAPPING, version: 0 } }),
	ownedApi('/traces/[traceId]/curve', 'bench', { GET: null }),
	ownedApi('/traces/[traceId]/legs', 'bench', {
		GET: null,
		PUT: { legs: [{ endS: 60, kind: 'stopped' }], version: 0 }
	}),
	ownedApi('/traces/[traceId]/day-plan', 'bench', {
		PUT: { name: 'None', startSoc: 60, chargerMaxA: 40, version: null }
	}),
	ownedApi('/traces/[traceId]/restore', 'bench', { POST: null }),
	api('/simulations', 'workshop', 'POST'),
	api('/people', 'manager', 'GET'),
	ownedApi('/people/[personId]/role', 'manager', { PUT: { role: 'engineer', version: 0 } }),
	ownedApi('/people/[personId]/departure', 'manager', { POST: { version: 0 } }),
	ownedApi('/people/[personId]/return', 'manager', { POST: { version: 0 } }),
	ownedApi('/people/[personId]/second-factor', 'manager', { DELETE: null }),
	api('/invitations', 'manager', 'POST'),
	ownedApi('/invitations/[invitationId]/letter', 'manager', { POST: null }),
	ownedApi('/invitations/[invitationId]/withdrawal', 'manager', { POST: null }),
	api('/shop', 'manager', 'GET', 'PUT'),
	{ ...api('/shop/logo', 'manager', 'POST', 'DELETE'), bodies: { POST: Buffer.from('no picture') } },
	api('/shop/second-factor', 'manager', 'PUT'),
	api('/shop/cautions', 'manager', 'GET', 'PUT'),
	api('/shop/retention', 'manager', 'GET', 'PUT'),
	api('/audit', 'manager', 'GET'),
	api('/audit/check', 'manager', 'POST'),
	api('/review/zones', 'manager', 'GET'),
	api('/review/installations', 'manager', 'GET'),
	api('/review/trends', 'manager', 'GET'),
	api('/review/map', 'manager', 'GET'),
	api('/own-zones', 'manager', 'GET', 'POST'),
	ownedApi('/own-zones/[zoneId]', 'manager', { PUT: OWN_ZONE, DELETE: null })
];

const AUDIENCES: Record<Exclude<Audience, 'anyone'>, readonly Visitor[]> = {
	workshop: ['installer', 'engineer', 'manager', 'neighbour'],
	bench: ['engineer', 'manager', 'neighbour'],
	manager: ['manager', 'neighbour'],
	customer: ['customer', 'other customer']
};

export type Standing = 'let in' | 'asked to sign in' | 'refused' | 'told there is no such thing';

/** What a visitor must meet at a route. */
export function standingOf(visitor: Visitor, rule: RouteRule, method: string): Standing {
	const audience = rule.only?.[method] ?? rule.for;
	if (audience === 'anyone') return 'let in';
	if (visitor === 'nobody') return 'asked to sign in';
	if (!AUDIENCES[audience].includes(visitor)) return 'refused';
	return rule.owned && STRANGERS.includes(visitor) ? 'told there is no such thing' : 'let in';
}
