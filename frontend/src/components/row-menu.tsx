import { Menu, type MenuItem } from './menu.tsx';

/** The acts on one row of a list, behind three dots. */
export function RowMenu({ name, items }: { name: string; items: readonly MenuItem[] }) {
  return (
    <Menu
      label={`Actions for ${name}`}
      items={items}
      buttonClassName="inline-flex size-8 items-center justify-center rounded-full text-muted hover:bg-accent-soft hover:text-ink"
      button={
        <svg viewBox="0 0 16 16" className="size-4" fill="currentColor" aria-hidden="true">
          <circle cx="2.500" cy="8" r="1.400" />
          <circle cx="8" cy="8" r="1.400" />
          <circle cx="13.500" cy="8" r="1.400" />
        </svg>
      }
    />
  );
}
