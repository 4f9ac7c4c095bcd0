import { formatDate } from '$lib/format/dates';
import { formatCapacity } from '$lib/format/numbers';
import type { FieldFinding, FieldNoteInput, FieldNotesView } from '$lib/schemas/field-notes';
import type { SignedInPerson } from '$lib/schemas/people';
import { ENGINE_VERSION, parseScenario } from '$lib/thermal';
import { heatLimitsOf } from '$lib/thermal/chemistries';
import {
	checkReading,
	learnFrom,
	projectCapacity,
	weighHeat,
	type CapacityTrend,
	type ReadingDay
} from '$lib/thermal/field';
import { EngineInputError } from '$lib/thermal/correlations';
import { Assessment, FieldNote, FieldNoteStrike, Installation, Person } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import { presentFieldNote } from '../presenters/field-notes';
import { checkLabel, keepLabelCheck, type LabelCheck } from './accuracy/label-checks';
import { recordBy } from './audit';
import { daysBetween } from './days';
import { readingOf, scenarioOn } from './field-readings';
import { listTeaching, standNotes } from './field-standing';
import { findStandingMount } from './mounts';
import { listKeptOutlooks } from './outlooks';
import { refreshReview } from './review/keep-review';
import { afterOthers, workInSlices } from './slices';
import { touringOf } from './touring-year';

/** How many vehicles and mounts, and how many of them for the days in a year, are drawn to learn from a note. */
interface LearningEffort {
	samples: number;
	yearSamples: number;
}
const FULL_LEARNING: LearningEffort = { samples: 512, yearSamples: 32 };
/** The same of fewer draws, said beside what comes of it. */
export const LIGHT_LEARNING: LearningEffort = { samples: 128, yearSamples: 8 };
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

/** The notes of a battery as they came, and what was struck out of them. */
interface Noted {
	notes: FieldNote[];
	strikes: FieldNoteStrike[];
}

function listReadings(assessment: Assessment, { notes, strikes }: Noted): ReadingDay[] {
	return listTeaching(notes, strikes).flatMap(({ data }) => {
		const reading = readingOf(data);
		if (reading === null || !('hottestDayC' in data)) return [];
		return [{ scenario: scenarioOn(assessment, data.hottestDayC), reading }];
	});
}

/** Was it heat, and what does it teach? Worked out in slices, one after the other. */
async function findOut(
	assessment: Assessment,
	earlier: Noted,
	data: FieldNoteInput,
	{ seed, samples, yearSamples }: LearningEffort & { seed: number }
): Promise<FieldFinding | null> {
	const reading = readingOf(data);
	if (reading === null || !('hottestDayC' in data)) return null;
	const scenario = scenarioOn(assessment, data.hottestDayC);
	return afterOthers(async () => {
		const cause =
			reading.kind === 'cut-out'
				? await workInSlices(weighHeat(scenario, reading.report, { samples, seed }))
				: null;
		if (cause && cause.finding !== 'explained') return { cause, learning: null };
		const { tMax } = parseScenario(assessment.inputs.scenario).climate;
		const days = [...listReadings(assessment, earlier), { scenario, reading }];
		const options = { samples, yearSamples, seed };
		const work = learnFrom(scenarioOn(assessment, tMax), days, touringOf(assessment.inputs), options);
		return { cause, learning: await workInSlices(work) };
	});
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

async function notesOf({ id: installationId }: Installation): Promise<Noted> {
	const notes = await FieldNote.findAll({
		where: { installationId },
		order: [
			['notedOn', 'ASC'],
			['id', 'ASC']
		]
	});
	const where = { fieldNoteId: notes.map(({ id }) => id) };
	return { notes, strikes: await FieldNoteStrike.findAll({ where, order: [['id', 'ASC']] }) };
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
	const noted = await notesOf(fitted.installation);
	const { notes, strikes } = noted;
	const people = await Person.findAll({
		where: { id: [...notes, ...strikes].map(({ createdBy }) => createdBy) }
	});
	const nameOf = (id: number): string => people.find((person) => person.id === id)?.name ?? '';
	const standings = standNotes(notes, strikes);
	return {
		rows: [...notes].reverse().map((note) => presentFieldNote(note, standings.get(note.id)!, nameOf)),
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
	/** The newest note that it was weighed with, and the newest strike. */
	after: Newest;
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
	const earlier = await notesOf(installation);
	const finding = await findOut(assessment, earlier, data, { ...effort, seed: installation.id });
	const check = await checkLabel(installation, data);
	return { data, finding, check, after: newestOf(earlier) };
}

interface Newest {
	noteId: number;
	strikeId: number;
}

const newestOf = ({ notes, strikes }: Noted): Newest => ({
	noteId: Math.max(0, ...notes.map(({ id }) => id)),
	strikeId: Math.max(0, ...strikes.map(({ id }) => id))
});

const NOTED_MEANWHILE =
	'Somebody noted something of this battery meanwhile, or struck it out, which counts here: send yours again.';

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
		await Installation.findByPk(installation.id, { transaction, lock: transaction.LOCK.UPDATE });
		const { noteId, strikeId } = newestOf(await notesOf(installation));
		if (noteId !== after.noteId || strikeId !== after.strikeId)
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
