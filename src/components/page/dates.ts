/** Dates as they stand in the pages: "3 March 2026", and with the hour in UTC where it matters. */
const day = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  timeZone: 'UTC',
});
const short = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  timeZone: 'UTC',
});
const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', timeZone: 'UTC' });

export const onDay = (iso: string): string => day.format(new Date(iso));
export const onShortDay = (iso: string): string => short.format(new Date(iso));
export const atTime = (iso: string): string =>
  `${short.format(new Date(iso))}, ${clock.format(new Date(iso))} UTC`;
