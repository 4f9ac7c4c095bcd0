import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { TraceFailure, TraceProposalView, TraceSpan, TraceState } from '$lib/schemas/traces';
import type { TraceLeg, TraceMapping, TraceReport } from '$lib/thermal/traces';
import {
	edited,
	flag,
	id,
	json,
	moment,
	optionalJson,
	optionalMoment,
	optionalNumber,
	optionalReference,
	reference,
	text,
	whole
} from './base';

/** What a logger measured at a mount; its bins, and the file until it is read, are in the storage. */
export class Trace extends Model<InferAttributes<Trace>, InferCreationAttributes<Trace>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare jobId: number;
	declare mountId: number;
	/** As it was called where it came from. */
	declare name: string;
	/** Made up, not measured. */
	declare isSynthetic: CreationOptional<boolean>;
	declare state: TraceState;
	declare bytes: number;
	/** Of the file as it came. */
	declare sha256: string;
	/** What its contents are called in the storage. */
	declare contentId: string;
	/** Of the logger. */
	declare fingerprint: string;
	declare proposal: TraceProposalView;
	declare mapping: TraceMapping;
	declare failure: CreationOptional<TraceFailure | null>;
	declare report: CreationOptional<TraceReport | null>;
	declare span: CreationOptional<TraceSpan | null>;
	/** Clock hour at which it begins, where its own times do not say. */
	declare startHour: CreationOptional<number | null>;
	declare legs: CreationOptional<TraceLeg[]>;
	/** Null while they are as they were proposed. */
	declare legsBy: CreationOptional<number | null>;
	declare uploadedBy: number;
	declare mappedBy: CreationOptional<number | null>;
	declare readAt: CreationOptional<Date | null>;
	declare removedAt: CreationOptional<Date | null>;
	declare version: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initTrace(sequelize: Sequelize): void {
	Trace.init(
		{
			id: id,
			workshopId: reference,
			jobId: reference,
			mountId: reference,
			name: text,
			isSynthetic: { ...flag, defaultValue: false },
			state: text,
			bytes: whole,
			sha256: text,
			contentId: text,
			fingerprint: text,
			proposal: json,
			mapping: json,
			failure: optionalJson,
			report: optionalJson,
			span: optionalJson,
			startHour: optionalNumber,
			legs: { type: DataTypes.JSON, allowNull: false, defaultValue: [] },
			legsBy: optionalReference,
			uploadedBy: reference,
			mappedBy: optionalReference,
			readAt: optionalMoment,
			removedAt: optionalMoment,
			version: { ...whole, defaultValue: 0 },
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'traces', ...edited, modelName: 'Trace' }
	);
}
