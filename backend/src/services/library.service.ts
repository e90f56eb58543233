import type { Page } from '#common/schemas/api/common.ts';
import type { LibraryContent, LibraryKind } from '#common/schemas/api/library.ts';
import { ConflictError, InvalidInputError, NotFoundError } from '#backend/domain/errors.ts';
import type { Member } from '#backend/domain/principal.ts';
import type { LibraryRecord, ListQuery } from '#backend/domain/records.types.ts';
import type { Database } from '#backend/persistence/database.ts';
import type { LibraryFilter, LibrarySort } from '#backend/persistence/library.repository.ts';

/** An item that comes with the product; nobody changes it. */
export interface CatalogueItem {
  /** Readable key such as `cell:CR2032`. */
  id: string;
  name: string;
  note: string;
  content: LibraryContent;
}

export interface LibraryQuery extends ListQuery<LibrarySort> {
  kind?: LibraryKind | undefined;
  origin: 'workspace' | 'catalogue' | 'all';
}

export interface LibraryUpdate {
  version: number;
  name?: string;
  note?: string;
  content?: LibraryContent;
  archived?: boolean;
}

/** Reusable parts, cells and climates: the workspace's own and, read-only, the catalogue's. */
export class LibraryService {
  readonly #database: Database;
  readonly #catalogue: readonly LibraryRecord[];

  constructor(database: Database, catalogue: readonly CatalogueItem[]) {
    this.#database = database;
    this.#catalogue = catalogue.map(({ id, name, note, content }) => ({
      id,
      name,
      note,
      content,
      origin: 'catalogue',
      version: null,
      archivedAt: null,
      updatedAt: null,
    }));
  }

  /**
   * Lists items of the workspace, of the catalogue, or of both in one order.
   *
   * @param member who asks
   * @param query page, order and filters
   * @returns one page
   */
  async list(member: Member, query: LibraryQuery): Promise<Page<LibraryRecord>> {
    const { library } = this.#database.workspace(member.workspaceId);
    const compare = comparison(query.sort);
    const fixed = query.origin === 'workspace' ? [] : this.#filterCatalogue(query).sort(compare);
    const ownCount = query.origin === 'catalogue' ? 0 : await library.count(query);
    const first = (query.page - 1) * query.pageSize;
    // Of the rows only those can lie on this page that at most all catalogue items push there.
    const skipped = Math.min(Math.max(0, first - fixed.length), ownCount);
    const own = ownCount === 0 ? [] : await library.listRange(query, skipped, query.pageSize + fixed.length);
    const start = own[0];
    const before = skipped > 0 && start ? fixed.filter((item) => compare(item, start) < 0) : [];
    const merged = [...own, ...fixed.slice(before.length)].sort(compare);
    const at = first - skipped - before.length;
    return {
      items: merged.slice(at, at + query.pageSize),
      page: query.page,
      pageSize: query.pageSize,
      total: ownCount + fixed.length,
    };
  }

  /**
   * Reads an item of the workspace.
   *
   * @param member who asks
   * @param id of the item
   * @returns the item, archived or not
   * @throws {NotFoundError} when the workspace has no such item
   */
  async get(member: Member, id: string): Promise<LibraryRecord> {
    const item = await this.#database.workspace(member.workspaceId).library.findById(id);
    if (item === null) throw new NotFoundError();
    return item;
  }

  /**
   * Adds an item to the workspace's library.
   *
   * @param member who asks
   * @param item name, note and content
   * @returns the new item
   */
  async create(member: Member, item: { name: string; note: string; content: LibraryContent }): Promise<LibraryRecord> {
    const { library } = this.#database.workspace(member.workspaceId);
    return this.get(member, await library.create({ ...item, updatedById: member.userId }));
  }

  /**
   * Changes an item of the version that was read.
   *
   * @param member who asks
   * @param id of the item
   * @param update the version read, and the fields to change
   * @returns the changed item
   * @throws {NotFoundError} when the workspace has no such item
   * @throws {InvalidInputError} when the content is of another kind
   * @throws {ConflictError} when it was changed meanwhile; nothing is stored then
   */
  async update(member: Member, id: string, update: LibraryUpdate): Promise<LibraryRecord> {
    const { version, ...changes } = update;
    return this.#database.transaction(async (unit) => {
      const { library } = unit.workspace(member.workspaceId);
      const stored = await library.findById(id);
      if (stored === null) throw new NotFoundError();
      if (changes.content && changes.content.kind !== stored.content.kind) {
        throw new InvalidInputError([
          { path: 'content.kind', message: `This item is a ${stored.content.kind} and stays one.` },
        ]);
      }
      const isDone = await library.updateIfVersion(id, version, { ...changes, updatedById: member.userId });
      const current = await library.findById(id);
      if (current === null) throw new NotFoundError();
      if (!isDone) throw new ConflictError({ kind: 'library-item', current });
      return current;
    });
  }

  #filterCatalogue({ kind, q, archived }: LibraryFilter): LibraryRecord[] {
    if (archived === 'true') return [];
    const text = q.toLowerCase();
    return this.#catalogue.filter(
      (item) => (kind === undefined || item.content.kind === kind) && item.name.toLowerCase().includes(text),
    );
  }
}

/** The same order as the repository's: folded name by code point or time, absent times last, ties by id. */
function comparison(sort: LibrarySort): (a: LibraryRecord, b: LibraryRecord) => number {
  const sign = sort.startsWith('-') ? -1 : 1;
  return (a, b) => {
    if (sort.endsWith('updatedAt') && (a.updatedAt === null) !== (b.updatedAt === null)) {
      return a.updatedAt === null ? 1 : -1;
    }
    const [left, right] = sort.endsWith('updatedAt')
      ? [a.updatedAt?.getTime() ?? 0, b.updatedAt?.getTime() ?? 0]
      : [a.name.toLowerCase(), b.name.toLowerCase()];
    if (left !== right) return left < right ? -sign : sign;
    return a.id === b.id ? 0 : a.id < b.id ? -sign : sign;
  };
}
