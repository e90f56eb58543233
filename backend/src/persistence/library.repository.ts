import { randomUUID } from 'node:crypto';
import type { SelectQueryBuilder } from 'typeorm';
import type { LibraryContent, LibraryKind } from '#common/schemas/api/library.ts';
import type { LibraryRecord, ListQuery } from '#backend/domain/records.types.ts';
import { filterList, orderList } from './listing.ts';
import { LibraryItemEntity } from './workspace.entities.ts';
import type { WorkspaceScope } from './workspace-scope.ts';

export type LibrarySort = 'name' | '-name' | 'updatedAt' | '-updatedAt';

export interface LibraryFilter extends Pick<ListQuery<LibrarySort>, 'q' | 'archived' | 'sort'> {
  kind?: LibraryKind | undefined;
}

export interface LibraryChanges {
  name?: string;
  note?: string;
  content?: LibraryContent;
  archived?: boolean;
  updatedById: string;
}

export class LibraryRepository {
  readonly #scope: WorkspaceScope;

  constructor(scope: WorkspaceScope) {
    this.#scope = scope;
  }

  async count(filter: LibraryFilter): Promise<number> {
    return this.#filtered(filter).getCount();
  }

  async listRange(filter: LibraryFilter, offset: number, limit: number): Promise<LibraryRecord[]> {
    const builder = this.#filtered(filter);
    orderList(builder, filter.sort, { name: 'lower(i.name) COLLATE "C"', updatedAt: 'i.updatedAt' }, 'i.id');
    const rows = await builder.offset(offset).limit(limit).getRawMany<Omit<LibraryRecord, 'origin'>>();
    return rows.map(toItem);
  }

  async findById(id: string): Promise<LibraryRecord | null> {
    const row = await this.#select().andWhere('i.id = :id', { id }).getRawOne<Omit<LibraryRecord, 'origin'>>();
    return row ? toItem(row) : null;
  }

  async create(item: { name: string; note: string; content: LibraryContent; updatedById: string }): Promise<string> {
    const id = randomUUID();
    const { kind } = item.content;
    await this.#scope.insert(LibraryItemEntity, (workspaceId) => ({ id, workspaceId, kind, ...item }));
    return id;
  }

  /** False when no row has this id and version. */
  async updateIfVersion(id: string, version: number, { archived, content, ...rest }: LibraryChanges): Promise<boolean> {
    const result = await this.#scope
      .update(LibraryItemEntity, {
        ...rest,
        ...(content === undefined ? {} : { content: () => ':content', kind: content.kind }),
        ...(archived === undefined ? {} : { archivedAt: archived ? () => 'COALESCE(archived_at, now())' : null }),
        version: () => 'version + 1',
        updatedAt: () => 'clock_timestamp()',
      })
      .setParameter('content', content === undefined ? null : JSON.stringify(content))
      .andWhere('id = :id AND version = :version', { id, version })
      .execute();
    return result.affected === 1;
  }

  #filtered(filter: LibraryFilter): SelectQueryBuilder<LibraryItemEntity> {
    const builder = filterList(this.#select(), 'i', filter);
    return filter.kind === undefined ? builder : builder.andWhere('i.kind = :kind', { kind: filter.kind });
  }

  #select(): SelectQueryBuilder<LibraryItemEntity> {
    return this.#scope
      .select(LibraryItemEntity, 'i')
      .select('i.id', 'id')
      .addSelect('i.name', 'name')
      .addSelect('i.note', 'note')
      .addSelect('i.content', 'content')
      .addSelect('i.version', 'version')
      .addSelect('i.archivedAt', 'archivedAt')
      .addSelect('i.updatedAt', 'updatedAt');
  }
}

function toItem(row: Omit<LibraryRecord, 'origin'>): LibraryRecord {
  return { ...row, origin: 'workspace' };
}
