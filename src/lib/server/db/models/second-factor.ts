import {
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { moment, optionalMoment, reference, text, whole, writtenOnce } from './base';

/** What a person's telephone makes codes from; it counts once a code has confirmed it. */
export class SecondFactor extends Model<
	InferAttributes<SecondFactor>,
	InferCreationAttributes<SecondFactor>
> {
	declare personId: number;
	/** Encrypted with a key of this installation. */
	declare lockedKey: string;
	declare confirmedAt: CreationOptional<Date | null>;
	/** The newest step whose code was used: neither it nor an older one is taken again. */
	declare lastStep: CreationOptional<number>;
	declare createdAt: CreationOptional<Date>;
}

export function initSecondFactor(sequelize: Sequelize): void {
	SecondFactor.init(
		{
			personId: { ...reference, primaryKey: true },
			lockedKey: text,
			confirmedAt: optionalMoment,
			lastStep: { ...whole, defaultValue: 0 },
			createdAt: moment
		},
		{ sequelize, tableName: 'second_factors', ...writtenOnce, modelName: 'SecondFactor' }
	);
}
