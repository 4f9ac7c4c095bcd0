import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { id, moment, reference, text, whole, writtenOnce } from './base';

/** A logo as it was made anew from what was sent: a PNG of known size. */
export class WorkshopLogo extends Model<
	InferAttributes<WorkshopLogo>,
	InferCreationAttributes<WorkshopLogo>
> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare sha256: string;
	declare widthPx: number;
	declare heightPx: number;
	declare png: Buffer;
	declare createdAt: CreationOptional<Date>;
}

export function initWorkshopLogo(sequelize: Sequelize): void {
	WorkshopLogo.init(
		{
			id: id,
			workshopId: reference,
			sha256: { ...text, field: 'sha256' },
			widthPx: whole,
			heightPx: whole,
			png: { type: DataTypes.BLOB('medium'), allowNull: false },
			createdAt: moment
		},
		{ sequelize, tableName: 'workshop_logos', ...writtenOnce, modelName: 'WorkshopLogo' }
	);
}
