import "server-only";
import type { Model, ModelAttributes, ModelStatic } from "sequelize";
import { sequelize } from "@/lib/server/sequelize";

interface Shape {
  readonly name: string;
  readonly table: string;
  /** `true`: created_at and updated_at are kept by Sequelize; otherwise the table's own columns say when. */
  readonly timestamps?: boolean;
}

/**
 * Binds a class to its table. Runs at every evaluation of a model's module, since Next evaluates server modules
 * once per bundle layer: each layer has its own classes over the one shared connection pool.
 */
export function define<M extends Model>(
  model: ModelStatic<M>,
  shape: Shape,
  attributes: ModelAttributes<M>,
): void {
  model.init(attributes, {
    sequelize,
    modelName: shape.name,
    tableName: shape.table,
    underscored: true,
    timestamps: shape.timestamps ?? false,
  });
}
