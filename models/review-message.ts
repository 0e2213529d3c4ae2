import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** A question or answer in a review. */
export class ReviewMessageModel extends Model<
  InferAttributes<ReviewMessageModel>,
  InferCreationAttributes<ReviewMessageModel>
> {
  declare id: CreationOptional<string>;
  declare reviewId: string;
  declare authorId: string;
  declare body: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    ReviewMessageModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        reviewId: { type: DataTypes.UUID, allowNull: false },
        authorId: { type: DataTypes.UUID, allowNull: false },
        body: { type: DataTypes.TEXT, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'ReviewMessage', tableName: 'review_messages' },
    );
  }
}
