import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { TraceMapping } from '$lib/thermal/traces';
import { id, json, moment, reference, text } from './base';

/** How a logger writes, as it was confirmed last. */
export class TraceLogger extends Model<InferAttributes<TraceLogger>, InferCreationAttributes<TraceLogger>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare fingerprint: string;
	declare mapping: TraceMapping;
	declare mappedBy: number;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initTraceLogger(sequelize: Sequelize): void {
	TraceLogger.init(
		{
			id: id,
			workshopId: reference,
			fingerprint: text,
			mapping: json,
			mappedBy: reference,
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'trace_loggers', timestamps: true, modelName: 'TraceLogger' }
	);
}
