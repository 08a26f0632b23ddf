import { DefaultNamingStrategy, type Table, type View } from 'typeorm';

/**
 * Columns in snake case, and constraints named as PostgreSQL names them by itself (`stage_crew_craft_id_fkey`), so that a
 * migration written by hand and the entities agree, and an error names something that a person can read.
 */
export class Naming extends DefaultNamingStrategy {
  override columnName(propertyName: string, customName: string | undefined): string {
    return customName ?? snakeCase(propertyName);
  }

  override primaryKeyName(table: Table | string): string {
    return `${nameOf(table)}_pkey`;
  }

  override uniqueConstraintName(table: Table | string, columns: string[]): string {
    return `${nameOf(table)}_${columns.join('_')}_key`;
  }

  override relationConstraintName(table: Table | string, columns: string[]): string {
    return this.uniqueConstraintName(table, columns);
  }

  override foreignKeyName(table: Table | string, columns: string[]): string {
    return `${nameOf(table)}_${columns.join('_')}_fkey`;
  }

  override indexName(table: Table | View | string, columns: string[]): string {
    return `${nameOf(table)}_${columns.join('_')}_idx`;
  }
}

function nameOf(table: Table | View | string): string {
  return (typeof table === 'string' ? table : table.name).split('.').pop() ?? '';
}

function snakeCase(name: string): string {
  return name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);
}
