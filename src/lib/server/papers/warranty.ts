import { DEFERENCE } from '$lib/format/deference';
import { formatDate } from '$lib/format/dates';
import type { Paper, PaperBlock } from '$lib/schemas/papers';
import { presentNote, presentTrend } from '../presenters/field-reports';
import {
	tellAgreement,
	tellBattery,
	tellDay,
	tellFitted,
	tellFollowUps,
	tellPreDrill,
	tellVehicle,
	warnOtherwise,
	type MountRecord
} from './mount-record';

function tellMaker({ paper: { report } }: MountRecord): PaperBlock[] {
	if (!report.maker) return [];
	return [{ kind: 'words', strong: report.maker.title, sentences: [report.maker.text] }];
}

function warnFigures(record: MountRecord): PaperBlock[] {
	const sentences = warnOtherwise(record);
	return sentences.length > 0 ? [{ kind: 'words', sentences }] : [];
}

/** Each note with what the model made of it, the oldest first. */
function tellNotes({ notes }: MountRecord): PaperBlock {
	const rows = [...notes.rows].reverse().map((row) => {
		const { title, when, words, struck, cause, anew, learning } = presentNote(row);
		if (struck) {
			const said = `${words} ${struck.who}, and counts nowhere: ${struck.reason}`;
			return [`${title}, struck out`, when, said];
		}
		const heat = cause ? [`Was it heat? ${cause.word}.`, cause.sentence, cause.usual, cause.doubt] : [];
		return [title, when, [words, ...heat, anew, learning?.sentence ?? ''].filter(Boolean).join(' ')];
	});
	return {
		...{ kind: 'table', title: 'Noted since it was fitted', empty: 'Nothing has been noted.' },
		...{ heads: ['What', 'When', 'Words and figures'], rows }
	};
}

function tellTrend({ notes }: MountRecord): PaperBlock[] {
	const trend = presentTrend(notes);
	if (!trend) return [];
	const { sentence, method } = trend;
	return [{ kind: 'words', title: 'Where its capacity goes', sentences: [sentence, method] }];
}

/** The day of the last thing that it tells of: the same record is the same paper. */
function lastDayOf({ paper, fitting, preDrill, notes, acknowledgement }: MountRecord): string {
	const days = [
		fitting.installation.fittedOn,
		paper.recommendation.createdAt,
		preDrill.signedAt,
		acknowledgement?.acknowledgedAt,
		...fitting.followUps.map(({ doneOn }) => doneOn),
		...notes.rows.flatMap(({ notedOn, struck }) => [notedOn, struck?.at])
	];
	return days
		.flatMap((day) => (day ? [day.slice(0, 10)] : []))
		.sort()
		.at(-1)!;
}

/** Everything about one battery, for its maker: what was said, measured and done, and by whom. */
export function layWarrantyFile(record: MountRecord): Paper {
	const { paper, fitting, photos } = record;
	const { report, recommendation } = paper;
	const lastDay = lastDayOf(record);
	return {
		title: 'Warranty file',
		under: `Job ${recommendation.jobNumber}, as of ${formatDate(lastDay)}`,
		shop: paper.workshop,
		logo: paper.logo,
		madeAt: `${lastDay}T00:00:00.000Z`,
		blocks: [
			{
				kind: 'words',
				sentences: [
					'A record of what was said, measured and done. It makes no claim on anybody’s behalf; the terms of the battery’s maker decide.'
				]
			},
			tellVehicle(record),
			tellBattery(record),
			...tellMaker(record),
			tellAgreement(record),
			...tellFitted(fitting),
			tellPreDrill(record),
			{ kind: 'figures', title: 'Figures of the estimate', lines: report.figures },
			...warnFigures(record),
			tellDay(record),
			tellNotes(record),
			...tellTrend(record),
			tellFollowUps(record),
			{
				kind: 'lines',
				title: 'The mount as it was surveyed',
				lines: report.survey.flatMap(({ lines }) => lines)
			},
			{ kind: 'lines', title: 'Place and hot day', lines: report.hotDay },
			{ kind: 'lines', title: 'What made the estimate', lines: report.versions },
			...(photos.length > 0 ? [{ kind: 'photos' as const, title: 'Photos', photos }] : []),
			{ kind: 'cautions', cautions: paper.cautions },
			{ kind: 'words', sentences: [DEFERENCE.replace('recommendation', 'file')] }
		]
	};
}
