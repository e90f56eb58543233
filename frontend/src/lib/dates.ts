const DATE = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });
const TIME = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

/** A moment as people of this office say it: the time today, otherwise the date. */
export function dayOrTime(iso: string, now: Date = new Date()): string {
  const moment = new Date(iso);
  return moment.toDateString() === now.toDateString() ? `today ${TIME.format(moment)}` : DATE.format(moment);
}

/** Date and time in full, for titles. */
export function dateAndTime(iso: string): string {
  const moment = new Date(iso);
  return `${DATE.format(moment)}, ${TIME.format(moment)}`;
}
