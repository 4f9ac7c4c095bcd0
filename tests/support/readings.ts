import { QueryTypes } from 'sequelize';
import { readingsQuerySchema, type ReadingsQuery } from '../../src/lib/schemas/accuracy';
import { connection } from '../../src/lib/server/db/connection';
import type { Held } from '../../src/lib/thermal/field';
import { writeChecks } from '../../src/lib/server/services/accuracy/check-rows';
import { inTransaction } from '../../src/lib/server/db/transaction';

export const askReadings = (query: Partial<Record<keyof ReadingsQuery, unknown>> = {}): ReadingsQuery =>
	readingsQuerySchema.parse(query);

/** An error of so many kelvin on a prediction of 60 °C, with a band of 5 K on each side. */
export function heldBy(error: number): Held {
	const stand = error > 5 ? 'above' : error < -5 ? 'below' : 'inside';
	const band = { predicted: 60, low: 55, high: 65 };
	return { measured: 60 + error, ...band, error, deviations: error / 3, stand };
}

/** The rows that are kept of an installation, without their numbers, in the order of the days. */
export async function readChecks(installationId: number) {
	const rows = await connection().query<Record<string, unknown>>(
		'SELECT * FROM prediction_checks WHERE installation_id = :installationId ORDER BY kind, read_on, field_note_id',
		{ replacements: { installationId }, type: QueryTypes.SELECT }
	);
	return rows.map(({ id: _id, ...row }) => row);
}

interface About {
	workshopId: number;
	mountId: number;
	installationId: number;
	assessmentId: number;
	bookId: number;
}

/** Keeps invented readings beside an installation: they have no note. */
export async function inventLabels(about: About, errorsK: readonly number[]): Promise<void> {
	const common = {
		kind: 'label',
		fieldNoteId: null,
		traceId: null,
		watched: null,
		isEnteredLater: false
	} as const;
	await inTransaction((transaction) =>
		writeChecks(
			errorsK.map((error) => ({
				...{ ...common, ...about, readOn: '2026-03-01', held: heldBy(error), leftOut: '' as const }
			})),
			transaction
		)
	);
}
