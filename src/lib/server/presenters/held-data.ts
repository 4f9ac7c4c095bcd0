import { FIELD_NOTE_LABELS } from '$lib/schemas/field-notes';
import { LETTER_KINDS, type LetterKind } from '$lib/schemas/letters';
import type { MyErasure } from '$lib/schemas/erasures';
import type { Question } from '$lib/schemas/questions';
import type { MyVehicle } from '$lib/schemas/my';
import type {
	Acknowledgement,
	Assessment,
	Customer,
	FieldNote,
	FieldNoteStrike,
	Job,
	OutgoingMail,
	Person,
	Session,
	Sheet,
	StoredFile,
	Trace,
	Vehicle
} from '../db/models';

/** Everything that is held about a customer, as it was read. */
export interface HeldRows {
	customer: Customer;
	people: Person[];
	sessions: Session[];
	vehicles: Vehicle[];
	jobs: Job[];
	assessments: Assessment[];
	sheets: (Sheet & { acknowledgement?: Acknowledgement | null })[];
	questions: { jobId: number; thread: Question[] }[];
	letters: OutgoingMail[];
	files: StoredFile[];
	traces: Trace[];
	/** What was noted and struck out: the story tells no more of it than that. */
	struckNotes: { jobId: number; note: FieldNote; strike: FieldNoteStrike }[];
	story: MyVehicle[];
	erasure: MyErasure | null;
}

const iso = (moment: Date | null | undefined): string | null => moment?.toISOString() ?? null;

const presentVehicle = (vehicle: Vehicle) => ({
	...{ make: vehicle.make, model: vehicle.model, modelYear: vehicle.modelYear },
	...{ registration: vehicle.registration, engineLayout: vehicle.engineLayout },
	...{ massKg: vehicle.massKg, dragAreaM2: vehicle.dragAreaM2 },
	...{ towMassKg: vehicle.towMassKg, towDragAreaM2: vehicle.towDragAreaM2 }
});

const presentAssessment = ({ inputs, verdict, headroomK, peakCellsC, createdAt }: Assessment) => ({
	...{ workedOutAt: iso(createdAt), position: inputs.mount.name, placeOfTheHotDay: inputs.place.name },
	...{ verdict, headroomK, hottestCellsC: peakCellsC, surveyAnswers: inputs.mount.survey }
});

const presentSheet = (sheet: HeldRows['sheets'][number]) => ({
	...{ sentTo: sheet.sentTo, sentAt: iso(sheet.createdAt), firstOpenedAt: iso(sheet.firstOpenedAt) },
	withdrawnAt: iso(sheet.withdrawnAt),
	acknowledged: sheet.acknowledgement
		? { by: sheet.acknowledgement.name, at: iso(sheet.acknowledgement.createdAt) }
		: null,
	textAsSent: textOfSheet(sheet)
});

const presentLetter = ({ kind, recipient, subject, state, createdAt, sentAt }: OutgoingMail) => ({
	about: LETTER_KINDS[kind as LetterKind] ?? 'Letter',
	...{ to: recipient, subject, state, writtenAt: iso(createdAt), sentAt: iso(sentAt) }
});

const presentFile = (file: StoredFile) => ({
	...{ name: file.name, caption: file.caption, kind: file.kind, addedAt: iso(file.createdAt) },
	inThisParcel: pathOfFile(file)
});

const presentMeasurement = ({ name, createdAt, span, isSynthetic }: Trace) => ({
	...{ file: name, addedAt: iso(createdAt), madeUp: Boolean(isSynthetic) },
	measured: span?.channels ?? []
});

const presentStruckNote = ({ note, strike }: HeldRows['struckNotes'][number]) => ({
	...{ about: FIELD_NOTE_LABELS[note.kind], notedOn: note.notedOn, asNoted: note.data },
	...{ struckOutAt: iso(strike.createdAt), reason: strike.reason }
});

/** Where the content of a file lies in the parcel. */
export const pathOfFile = ({ id, kind }: StoredFile): string =>
	kind === 'photo' ? `files/photo-${id}.jpg` : `files/document-${id}.pdf`;

/** What is held, under names that a person can read; only what is listed here leaves the house. */
export function presentHeldData(held: HeldRows) {
	const {
		customer,
		people,
		sessions,
		vehicles,
		jobs,
		assessments,
		sheets,
		questions,
		letters,
		files,
		traces,
		struckNotes,
		story
	} = held;
	return {
		aboutYou: {
			...{ name: customer.name, email: customer.email, telephone: customer.phone },
			...{ knownSince: iso(customer.createdAt), remindersStoppedAt: iso(customer.remindersStoppedAt) }
		},
		signIns: people.map(({ id, name, email, createdAt }) => ({
			...{ name, email, since: iso(createdAt) },
			sessions: sessions
				.filter(({ personId }) => personId === id)
				.map((session) => ({ from: iso(session.createdAt), lastSeen: iso(session.lastSeenAt) }))
		})),
		vehicles: vehicles.map(presentVehicle),
		jobs: jobs.map(({ id, number, note, createdAt }) => ({
			...{ number, note, begunAt: iso(createdAt) },
			estimates: assessments.filter(({ jobId }) => jobId === id).map(presentAssessment),
			pages: sheets.filter(({ jobId }) => jobId === id).map(presentSheet),
			questions: questions.find(({ jobId }) => jobId === id)?.thread ?? [],
			photosAndDocuments: files.filter(({ jobId }) => jobId === id).map(presentFile),
			measurements: traces.filter(({ jobId }) => jobId === id).map(presentMeasurement),
			notesStruckOut: struckNotes.filter(({ jobId }) => jobId === id).map(presentStruckNote)
		})),
		letters: letters.map(presentLetter),
		whatHappened: story.map(({ name, history, lessons }) => ({ vehicle: name, history, lessons })),
		requestForDeletion: held.erasure
	};
}
export type HeldData = ReturnType<typeof presentHeldData>;

/** A page as it was sent, in plain text. */
export function textOfSheet({ content, createdAt }: Sheet): string {
	const { workshop, vehicle, battery, mountName, customerName, preparedBy, summary } = content;
	const list = (rows: readonly { label: string; text?: string; value?: string }[]): string[] =>
		rows.map(({ label, text, value }) => `${label}: ${text ?? value ?? ''}`);
	return [
		`${workshop.name}, job ${content.jobNumber}`,
		`${vehicle} / ${battery} / ${mountName}`,
		`Prepared for ${customerName} by ${preparedBy}, sent ${createdAt.toISOString().slice(0, 10)}`,
		content.headline,
		summary,
		...content.paragraphs,
		...list(content.outlook ?? []),
		content.advice,
		...(content.override ? [`Decided by ${content.override.decidedBy}: ${content.override.reason}`] : []),
		...list(content.figures),
		...content.cautions.map(({ title, text }) => `${title}. ${text}`)
	].join('\n\n');
}
