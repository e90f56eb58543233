import type { ObjectLiteral, SelectQueryBuilder } from 'typeorm';
import type { ListQuery } from '#backend/domain/records.types.ts';

/** Text as a LIKE pattern that finds it anywhere; its own wildcards stand for themselves. */
export function containsPattern(text: string): string {
  return `%${text.replace(/[\\%_]/g, (wildcard) => `\\${wildcard}`)}%`;
}

/** Filter by text in the name and by archive state; `alias` names the table. */
export function filterList<E extends ObjectLiteral>(
  builder: SelectQueryBuilder<E>,
  alias: string,
  { q, archived }: Pick<ListQuery<string>, 'q' | 'archived'>,
): SelectQueryBuilder<E> {
  if (q !== '') builder.andWhere(`${alias}.name ILIKE :pattern`, { pattern: containsPattern(q) });
  if (archived !== 'all') builder.andWhere(`${alias}.archivedAt IS ${archived === 'true' ? 'NOT NULL' : 'NULL'}`);
  return builder;
}

/** Order by an expression from a fixed table of sort keys, the id last so that pages never overlap. */
export function orderList<E extends ObjectLiteral, Field extends string>(
  builder: SelectQueryBuilder<E>,
  sort: Field | `-${Field}`,
  columns: Readonly<Record<Field, string>>,
  tieBreaker: string,
): SelectQueryBuilder<E> {
  const direction = sort.startsWith('-') ? 'DESC' : 'ASC';
  const field = sort.replace(/^-/, '');
  const column = Object.entries<string>(columns).find(([key]) => key === field)?.[1];
  if (column === undefined) throw new TypeError(`No list is sorted by ${field}.`);
  return builder.orderBy(column, direction, 'NULLS LAST').addOrderBy(tieBreaker, direction);
}

/** One page of rows and the count of all. */
export async function readPage<Row>(
  builder: SelectQueryBuilder<ObjectLiteral>,
  { page, pageSize }: { page: number; pageSize: number },
): Promise<{ rows: Row[]; total: number }> {
  const total = await builder.getCount();
  const rows = await builder
    .offset((page - 1) * pageSize)
    .limit(pageSize)
    .getRawMany<Row & ObjectLiteral>();
  return { rows, total };
}
