import type { Content, TableCell, TDocumentDefinitions } from 'pdfmake/interfaces';
import {
	listCableLines,
	listDerived,
	listLegLines,
	listOpenLines,
	listOutlookLines,
	PHOTOS_TITLE,
	sayCheck,
	sayDark
} from '$lib/components/report/print/paper-lines';
import { formatDate } from '$lib/format/dates';
import { formatKelvin } from '$lib/format/numbers';
import { DEFERENCE } from '$lib/format/deference';
import { sayAgainst, sayDecider, sayReplaced } from '$lib/format/recommendations';
import { sayVerdict } from '$lib/format/verdict';
import type { MountOutcome } from '$lib/schemas/assessments';
import type { ReportLine } from '$lib/schemas/reports';
import { drawLedger } from './ledger-picture';
import { drawRibbon } from './ribbon-picture';
import { HEAD_FAMILY, TEXT_FAMILY } from './make-pdf';
import {
	between,
	bold,
	figures,
	heading,
	inColumns,
	labelled,
	linesIn,
	mm,
	MUTED,
	paperHead,
	ruled,
	signatures,
	toldLines,
	type Weighed
} from './parts';
import type { RecommendationPaper } from './recommendation';

/** How large the type of each of the two pages is, against the usual. */
export interface PageScales {
	first: number;
	second: number;
}

/** What stands last on the first page, by this name in the layout. */
export const FIRST_PAGE_END = 'first-page-end';
/** And what stands first on the pages of photos. */
export const PHOTOS_START = 'photos-start';

const gap = (height: number): Content => ({ text: '', margin: [0, 0, 0, mm(height)] });

function answer({ report, recommendation, customer }: RecommendationPaper, size: number): Content {
	const [vehicle, battery] = [report.vehicle[0]?.value, report.battery[0]?.value];
	const who = [customer.name, customer.phone, customer.email].filter(Boolean).join(', ');
	const { preDrill } = recommendation;
	return {
		columns: [
			{
				...{ text: report.headline, font: HEAD_FAMILY, fontSize: size * 4.6, lineHeight: 0.92 },
				...{ width: 'auto', noWrap: true }
			},
			{
				width: '*',
				stack: [
					{ text: report.sentence, fontSize: size * 1.3, margin: [0, 0, 0, mm(1)] },
					{ text: `${report.mount} ${report.day}` },
					{ text: `For ${who}: ${vehicle}, with ${battery}.` },
					{
						text: [
							{ text: `Recommended by ${recommendation.recommendedBy}. ` },
							bold(sayReplaced(recommendation))
						]
					},
					...(preDrill
						? [{ text: [bold('Before drilling: '), { text: sayCheck(preDrill, ' (page 2)') }] }]
						: [])
				]
			}
		],
		columnGap: mm(6),
		margin: [0, mm(3), 0, mm(2)]
	};
}

function warnings({ report, recommendation }: RecommendationPaper): Content[] {
	const { reason, assessment } = recommendation;
	const against = sayAgainst(recommendation, assessment);
	return [
		...(report.maker
			? [between([{ text: [bold(`${report.maker.title} `), { text: report.maker.text }] }])]
			: []),
		...(against
			? [
					between([
						{
							text: [
								bold(`Goes ahead although ${against}. `),
								{ text: `Decided by ${sayDecider(recommendation)}. Reason: ${reason}` }
							]
						}
					])
				]
			: [])
	];
}

function ledgerTable({ ledger }: RecommendationPaper): Content {
	const { bar, rows, whole } = drawLedger(ledger);
	const width = mm(85);
	const body = rows.map(({ key, words, watts, kelvin }): TableCell[] => [
		key ? { svg: key, width: mm(4.5), margin: [0, mm(0.4), 0, 0] } : { text: '' },
		{ text: words },
		{ text: watts, alignment: 'right' },
		{ text: kelvin, alignment: 'right', bold: true }
	]);
	const head: TableCell[] = [
		{ text: 'From', color: MUTED, colSpan: 2 },
		{ text: '' },
		{ text: 'Heat then', color: MUTED, alignment: 'right' },
		{ text: 'In the cells', color: MUTED, alignment: 'right' }
	];
	const sum: TableCell[] = [
		{ text: 'Above the outside air, together', colSpan: 3 },
		{ text: '' },
		{ text: '' },
		{ text: whole, alignment: 'right', bold: true }
	];
	return {
		stack: [
			{ svg: bar, width, margin: [0, 0, 0, mm(1)] },
			{
				table: { widths: ['auto', '*', 'auto', 'auto'], body: [head, ...body, sum] },
				layout: 'lightHorizontalLines'
			}
		]
	};
}

function otherMounts(others: readonly MountOutcome[]): Content {
	const rows = others.map(({ letter, name, assessment }) => [
		`${letter}: ${name}`,
		...(assessment
			? [
					sayVerdict(assessment.verdict, assessment.chemistry),
					formatKelvin(assessment.headroomK),
					sayDark(assessment)
				]
			: ['not assessed', '', ''])
	]);
	return ruled(['Mount', 'Verdict', 'Headroom', 'Dark'], rows, [2, 3]);
}

function firstPage(paper: RecommendationPaper, scale: number): Content {
	const size = 8.4 * scale;
	const { recommendation, report, outlook, others } = paper;
	const picture = drawRibbon(paper.ribbon);
	const told = listOutlookLines(outlook).map((line, index): Weighed => ({
		content: toldLines([line])[0]!,
		weight: linesIn(`${line.label}${line.value}`, 95) + index * 0.01
	}));
	return {
		fontSize: size,
		stack: [
			paperHead({
				shop: paper.workshop,
				logo: paper.logo,
				title: `Recommendation ${recommendation.number}`,
				under: `Job ${recommendation.jobNumber}, ${formatDate(recommendation.createdAt)}`
			}),
			answer(paper, size),
			...warnings(paper),
			{ svg: picture, width: mm(136 * scale), alignment: 'center', margin: [0, mm(2), 0, mm(2)] },
			{
				columns: [
					{ width: '*', stack: [heading('Figures of the day', size * 1.13), figures(report.figures, size)] },
					{
						width: '*',
						stack: [heading('Where the heat at the peak came from', size * 1.13), ledgerTable(paper)]
					}
				],
				columnGap: mm(8)
			},
			gap(2),
			heading('What the estimate says beside its number', size * 1.13),
			{ ...(inColumns(told, 2) as object), fontSize: size * 0.84 } as Content,
			...(others.length > 0
				? [gap(1), heading('The same day in the other mounts', size * 1.13), otherMounts(others)]
				: []),
			{ text: DEFERENCE, fontSize: size * 0.88, margin: [0, mm(2.5), 0, 0] },
			signatures(['Installer', 'Customer'], FIRST_PAGE_END)
		]
	};
}

interface Section {
	title: string;
	lines: readonly ReportLine[];
}

/** A section line by line, so that it may go on in the next column. */
function weighSection({ title, lines }: Section, size: number): Weighed[] {
	if (lines.length === 0) return [];
	const head: Weighed = {
		content: { text: title, bold: true, fontSize: size * 1.12, margin: [0, mm(1.4), 0, mm(0.4)] },
		weight: 1.8
	};
	const rows = lines.map((line): Weighed => ({
		content: labelled([line]),
		weight: linesIn(`${line.label}: ${line.value} ${line.note ?? ''}`, 46) + 0.3
	}));
	return [head, ...rows];
}

function secondPage(paper: RecommendationPaper, scale: number): Content {
	const size = 7.4 * scale;
	const { report, recommendation, outlook } = paper;
	const sections: Section[] = [
		{ title: 'The mount as it was surveyed', lines: report.survey.flatMap(({ lines }) => lines) },
		{ title: 'Vehicle', lines: report.vehicle },
		{ title: 'Battery', lines: report.battery },
		{ title: 'Place and hot day', lines: report.hotDay },
		{ title: 'The day, leg by leg', lines: listLegLines(report.legs) },
		{ title: 'Cable and fuse', lines: listCableLines(outlook.cable) },
		{ title: 'Open before drilling', lines: listOpenLines(recommendation.preDrill) },
		{ title: 'What made it', lines: report.versions }
	];
	const derived = listDerived(report.derivations).map((line): Weighed => ({
		content: toldLines([line])[0]!,
		weight: linesIn(line.label + line.value, 110)
	}));
	const cautions = paper.cautions.map(({ title, text }): Weighed => ({
		content: toldLines([{ label: title, value: text }])[0]!,
		weight: linesIn(title + text, 95)
	}));
	return {
		fontSize: size,
		stack: [
			{ text: 'What went in', pageBreak: 'before', bold: true, fontSize: size * 1.28 },
			inColumns(
				sections.flatMap((section) => weighSection(section, size)),
				3
			),
			gap(2),
			heading('How the numbers of the model came about, and what nobody measured', size * 1.28),
			{ ...(inColumns(derived, 2) as object), fontSize: size * 0.88 } as Content,
			{ text: report.standing.join(' '), fontSize: size * 0.88 },
			gap(2),
			heading('Before anyone acts on this', size * 1.28),
			inColumns(cautions, 2)
		]
	};
}

/** What was photographed, on pages of its own, where anything was. */
const photoPages = (photos: Content | null): Content[] =>
	photos === null
		? []
		: [
				{
					...{ text: PHOTOS_TITLE, id: PHOTOS_START, bold: true, fontSize: 9.5 },
					...{ pageBreak: 'before', margin: [0, 0, 0, mm(2)] }
				},
				{ stack: [photos], fontSize: 8.4 }
			];

/** The recommendation on two A4 pages, as large as `scales` says, and what was photographed after them. */
export function layOutRecommendation(
	paper: RecommendationPaper,
	scales: PageScales,
	photos: Content | null
): TDocumentDefinitions {
	const { number, jobNumber } = paper.recommendation;
	return {
		pageSize: 'A4',
		pageMargins: [mm(14), mm(10), mm(14), mm(12)],
		defaultStyle: { font: TEXT_FAMILY, lineHeight: 1.12 },
		footer: (page, count) => ({
			text: `Recommendation ${number}, job ${jobNumber}, page ${page} of ${count}`,
			alignment: 'right',
			fontSize: 6.5,
			margin: [0, mm(3), mm(14), 0]
		}),
		content: [firstPage(paper, scales.first), secondPage(paper, scales.second), ...photoPages(photos)]
	};
}
