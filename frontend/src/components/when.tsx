import { dateAndTime, dayOrTime } from '#frontend/lib/dates.ts';

/** A moment in short, in full as a tip. */
export function When({ iso }: { iso: string }) {
  return (
    <time dateTime={iso} title={dateAndTime(iso)} className="whitespace-nowrap">
      {dayOrTime(iso)}
    </time>
  );
}
