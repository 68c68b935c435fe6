import { DefaultNamingStrategy, type NamingStrategyInterface, type Table } from 'typeorm';

const snake = (name: string) => name.replace(/([a-z0-9])([A-Z])/g, '$1_$2').toLowerCase();
const short = (table: Table | string) =>
  (typeof table === 'string' ? table : table.name).replace(/^.*\./, '');

/** snake_case columns, and constraint names a person can read in an error or a plan. */
export class SnakeNaming extends DefaultNamingStrategy implements NamingStrategyInterface {
  override tableName(className: string, customName: string | undefined): string {
    return customName ?? snake(className);
  }
  override columnName(propertyName: string, customName: string | undefined, prefixes: string[]): string {
    return snake([...prefixes, customName ?? propertyName].join('_'));
  }
  override relationName(propertyName: string): string {
    return snake(propertyName);
  }
  override joinColumnName(relationName: string, referencedColumnName: string): string {
    return snake(`${relationName}_${referencedColumnName}`);
  }
  override joinTableColumnName(tableName: string, propertyName: string, columnName?: string): string {
    return snake(`${tableName}_${columnName ?? propertyName}`);
  }
  override primaryKeyName(table: Table | string): string {
    return `pk_${short(table)}`;
  }
  override foreignKeyName(table: Table | string, columnNames: string[]): string {
    return `fk_${short(table)}_${columnNames.join('_')}`;
  }
  override indexName(table: Table | string, columnNames: string[], where?: string): string {
    return `ix_${short(table)}_${columnNames.join('_')}${where ? '_part' : ''}`;
  }
  override uniqueConstraintName(table: Table | string, columnNames: string[]): string {
    return `uq_${short(table)}_${columnNames.join('_')}`;
  }
}
