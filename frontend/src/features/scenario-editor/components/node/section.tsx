import type { ReactNode } from 'react';

interface SectionProps {
  id: string;
  /** In bold. */
  title: string;
  /** Behind it, in plain muted words. */
  note?: ReactNode;
  level?: 2 | 3;
  children: ReactNode;
}

/** A part of the page under its heading, set apart by space and not by a box. */
export function Section({ id, title, note, level = 2, children }: SectionProps) {
  const Heading = level === 2 ? 'h2' : 'h3';
  return (
    <section aria-labelledby={id} className={level === 2 ? 'mt-12' : 'mt-8'}>
      <div className="mb-2 flex flex-wrap items-baseline gap-x-4">
        <Heading id={id} className={level === 2 ? 'text-lg font-extrabold' : 'font-extrabold'}>
          {title}
        </Heading>
        {note !== undefined && <p className="text-small text-muted">{note}</p>}
      </div>
      {children}
    </section>
  );
}
