import { formatDate } from '$lib/format/dates';
import { formatCapacity } from '$lib/format/numbers';
import type { FieldFinding, FieldNoteInput, FieldNotesView } from '$lib/schemas/field-notes';
import type { SignedInPerson } from '$lib/schemas/people';
import { ENGINE_VERSION } from '$lib/thermal';
import { heatLimitsOf } from '$lib/thermal/chemistries';
import { checkReading, projectCapacity, type CapacityTrend } from '$lib/thermal/field';
import { EngineInputError } from '$lib/thermal/correlations';
import { Assessment, FieldNote, Installation, Person } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import { presentFieldNote, presentJudge, type JudgedNote } from '../presenters/field-notes';
import { checkLabel, keepLabelCheck, type LabelCheck } from './accuracy/label-checks';
import { recordBy } from './audit';
import { daysBetween } from './days';
import { countDoubts } from './field-doubts';
import { findOut, FULL_LEARNING } from './field-findings';
import { readingOf } from './field-readings';
import { standNotes } from './field-standing';
import { isSameKnown, knownOf, readNoted, type KnownThen, type Noted } from './judged-notes';
import { findStandingMount } from './mounts';
import { listKeptOutlooks } from './outlooks';
import { refreshReview } from './review/keep-review';

const DAYS_A_YEAR = 365.25;

interface Fitted {
	installation: Installation;
	assessment: Assessment;
}

async function findFitted(person: SignedInPerson, mountId: number): Promise<Fitted> {
	const { id, workshopId } = await findStandingMount(person, mountId);
	const installation = await Installation.findOne({ where: { mountId: id, workshopId } });
	if (!installation)
		throw new AppError('conflict', 'This mount has not been fitted yet: say first when it was.');
	const assessment = await Assessment.findByPk(installation.assessmentId);
	if (!assessment) throw notFound('assessment');
	return { installation, assessment };
}

/** What the engine refuses, under the name that the form has for it. */
const LABELS: Readonly<Record<string, string>> = {
	turnedC: 'Highest field that has turned',
	notTurnedC: 'Lowest field that has not',
	wentDarkHour: 'Went dark at',
	cameBackHour: 'Came back by itself at'
};
const sayLabelled = ({ input, message }: EngineInputError): string =>
	message.startsWith(input) ? `${LABELS[input] ?? input}${message.slice(input.length)}` : message;

/** A new battery holds some more than its rating, hardly half as much again: judgement, no source. */
const MOST_OF_RATED = 1.5;

/** The most that a test can have found; unknown where another battery was fitted than the one that was agreed. */
function mostCapacityAh({ installation, assessment }: Fitted): number | null {
	const isOther = installation.differences.some(({ key }) => key === 'battery');
	return isOther ? null : MOST_OF_RATED * assessment.inputs.battery.capacityAh;
}

function refuseImpossible(data: FieldNoteInput, fitted: Fitted): void {
	const { fittedOn } = fitted.installation;
	const refuse = (path: string, message: string): never => {
		throw new AppError('invalid_input', message, [{ path, message }]);
	};
	if (data.notedOn < fittedOn)
		refuse('notedOn', `The day must not be before it was fitted, ${formatDate(fittedOn)}.`);
	const mostAh = mostCapacityAh(fitted);
	if (data.kind === 'capacity-test' && mostAh !== null && data.capacityAh > mostAh) {
		const rated = formatCapacity(fitted.assessment.inputs.battery.capacityAh);
		refuse(
			'capacityAh',
			`Capacity found must be at most ${formatCapacity(mostAh)}, one and a half times the ${rated} of this battery.`
		);
	}
	const reading = readingOf(data);
	if (reading === null) return;
	try {
		checkReading(reading);
	} catch (error) {
		if (error instanceof EngineInputError) refuse(error.input, sayLabelled(error));
		throw error;
	}
}

function trendOf(
	{ installation, assessment }: Fitted,
	{ notes, strikes }: Noted,
	namedAh: number | null
): CapacityTrend | null {
	const { battery } = assessment.inputs;
	const struck = new Set(strikes.map(({ fieldNoteId }) => fieldNoteId));
	const tests = notes.flatMap(({ id, data }) => {
		if (data.kind !== 'capacity-test' || struck.has(id)) return [];
		const { notedOn, capacityAh, currentA, cutOffV, tempC } = data;
		const years = Math.max(daysBetween(installation.fittedOn, notedOn), 0) / DAYS_A_YEAR;
		return [{ years, capacityAh, currentA, cutOffV, tempC }];
	});
	if (tests.length === 0) return null;
	const isLeadAcid = heatLimitsOf(battery) !== null;
	return projectCapacity(tests, battery.capacityAh, { isLeadAcid, namedAh });
}

/** What the estimate expected of the capacity, where it has been worked out. */
async function expectedOf(person: SignedInPerson, { assessment: { id } }: Fitted) {
	const kept = await listKeptOutlooks(person, [id]);
	return kept.get(id)?.life?.years ?? null;
}

async function show(
	person: SignedInPerson,
	fitted: Fitted,
	namedAh: number | null = null
): Promise<FieldNotesView> {
	const noted = await readNoted([fitted.installation]);
	const { notes, strikes } = noted;
	const people = await Person.findAll({
		where: { id: [...notes, ...strikes].map(({ createdBy }) => createdBy) }
	});
	const nameOf = (id: number): string => people.find((person) => person.id === id)?.name ?? '';
	const standings = standNotes(notes, strikes);
	const judgedBy = presentJudge(fitted.assessment, fitted.installation);
	const doubts = countDoubts(noted, [fitted.installation]);
	const present = (note: JudgedNote) =>
		presentFieldNote(note, standings.get(note.id)!, { nameOf, judgedBy, doubts: doubts.get(note.id) ?? 0 });
	return {
		rows: [...notes].reverse().map(present),
		trend: trendOf(fitted, noted, namedAh),
		...{ namedAh, ratedAh: fitted.assessment.inputs.battery.capacityAh },
		expected: await expectedOf(person, fitted)
	};
}

/** What was noted of a fitted battery, the newest first, and where its capacity goes. */
export async function listFieldNotes(
	person: SignedInPerson,
	mountId: number,
	namedAh: number | null = null
): Promise<FieldNotesView> {
	allow(person, 'jobs.read');
	return show(person, await findFitted(person, mountId), namedAh);
}

/** A note with what the model makes of it, and what was known when it did. */
export interface WeighedNote {
	data: FieldNoteInput;
	finding: FieldFinding | null;
	/** A label, held against what was predicted at the time; nothing of other notes. */
	check: LabelCheck | null;
	/** The assessment by which it was weighed; the newest note that it was weighed with, and the newest strike. */
	after: KnownThen;
}

/** Works out what a note says, which takes seconds, and changes nothing. */
export async function weighFieldNote(
	person: SignedInPerson,
	mountId: number,
	data: FieldNoteInput,
	effort = FULL_LEARNING
): Promise<WeighedNote> {
	allow(person, 'mounts.write');
	const fitted = await findFitted(person, mountId);
	const { installation, assessment } = fitted;
	refuseImpossible(data, fitted);
	const earlier = await readNoted([installation]);
	const finding = await findOut(assessment, earlier, data, { ...effort, seed: installation.id });
	const check = await checkLabel(installation, data);
	return { data, finding, check, after: knownOf(installation, earlier) };
}

const NOTED_MEANWHILE =
	'Somebody noted something of this battery meanwhile, struck it out or held it against another recommendation, which counts here: send yours again.';

/** Keeps a weighed note for good. */
export async function keepFieldNote(
	person: SignedInPerson,
	mountId: number,
	{ data, finding, check, after }: WeighedNote
): Promise<FieldNotesView> {
	allow(person, 'mounts.write');
	const fitted = await findFitted(person, mountId);
	const { installation } = fitted;
	await inTransaction(async (transaction) => {
		const lock = transaction.LOCK.UPDATE;
		const now = await Installation.findByPk(installation.id, { transaction, lock });
		if (!isSameKnown(knownOf(now!, await readNoted([now!])), after))
			throw new AppError('conflict', NOTED_MEANWHILE);
		const { kind, notedOn } = data;
		const row = { workshopId: person.workshopId, installationId: installation.id, createdBy: person.id };
		const told = { kind, notedOn, data, finding, engineVersion: ENGINE_VERSION };
		const note = await FieldNote.create({ ...row, ...told }, { transaction });
		if (check) await keepLabelCheck(note, installation.mountId, check, transaction);
		await refreshReview('installation', installation.id, transaction);
		const subject = { type: 'mount', id: mountId };
		await recordBy(person, 'mount.field-note', subject, transaction, { noteId: note.id, ...data });
	});
	return show(person, fitted);
}

/** Weighs and keeps. */
export async function addFieldNote(
	person: SignedInPerson,
	mountId: number,
	data: FieldNoteInput,
	effort = FULL_LEARNING
): Promise<FieldNotesView> {
	return keepFieldNote(person, mountId, await weighFieldNote(person, mountId, data, effort));
}
