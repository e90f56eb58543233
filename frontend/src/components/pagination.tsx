import { Button } from './button.tsx';

export interface PaginationProps {
  page: number;
  pageSize: number;
  total: number;
  onPage: (page: number) => void;
  /** What is counted, such as "projects". */
  what: string;
}

export function Pagination({ page, pageSize, total, onPage, what }: PaginationProps) {
  const pages = Math.max(1, Math.ceil(total / pageSize));
  if (pages === 1 && page === 1) return null;
  const first = (page - 1) * pageSize + 1;
  const last = Math.min(total, page * pageSize);
  return (
    <nav aria-label={`Pages of ${what}`} className="mt-6 flex flex-wrap items-center justify-between gap-4">
      <p className="text-small text-muted tabular-nums">
        {last >= first ? `${first} to ${last} of ${total} ${what}` : `Past the last page: there are ${total} ${what}`}
      </p>
      <div className="flex gap-2">
        <Button disabled={page <= 1} onClick={() => onPage(Math.min(page - 1, pages))}>
          Earlier page
        </Button>
        <Button disabled={page >= pages} onClick={() => onPage(page + 1)}>
          Next page
        </Button>
      </div>
    </nav>
  );
}
