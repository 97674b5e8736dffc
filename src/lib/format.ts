// Everything that people read as a figure, a length or a time, written one way. Times are in the reader's own zone.

const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const twoDigits = (value: number) => String(value).padStart(2, '0');

/** A figure with its unit; the two are never parted at the end of a line. */
export function withUnit(figure: string, unit: string): string {
  return `${figure}\u00a0${unit}`;
}

/** "3 Mar 2026" */
export function formatDate(iso: string): string {
  const at = new Date(iso);
  return `${at.getDate()}\u00a0${months[at.getMonth()]}\u00a0${at.getFullYear()}`;
}

/** "09:12" */
export function formatTime(iso: string): string {
  const at = new Date(iso);
  return `${twoDigits(at.getHours())}:${twoDigits(at.getMinutes())}`;
}

/** "3 Mar 2026, 09:12" */
export function formatDateTime(iso: string): string {
  return `${formatDate(iso)}, ${formatTime(iso)}`;
}

/** "Sat, 5 Dec 2026, 19:00 (Europe/Paris)": a time as the people in that zone tell it. */
export function formatDateTimeIn(iso: string, zone: string): string {
  const day = { weekday: 'short', day: 'numeric', month: 'short', year: 'numeric' } as const;
  const time = { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' } as const;
  return `${new Intl.DateTimeFormat('en-GB', { ...day, ...time, timeZone: zone }).format(new Date(iso))} (${zone})`;
}

/** The reader's time zone as its name in the zone database, such as "Europe/Paris". */
export function timeZone(): string {
  return new Intl.DateTimeFormat().resolvedOptions().timeZone;
}

/** "1,234.5": at most `decimals` of them, and none that says nothing. */
export function formatNumber(value: number, decimals = 0): string {
  return value.toLocaleString('en', { maximumFractionDigits: decimals });
}

/** "1 session", "3 sessions" */
export function formatCount(count: number, one: string, many = `${one}s`): string {
  return withUnit(formatNumber(count), count === 1 ? one : many);
}

/** Whole millimetres as metres: "3 m", "0.75 m" */
export function formatLength(lengthMm: number): string {
  return withUnit(formatNumber(lengthMm / 1000, 3), 'm');
}

/** "45 s", "12 min", "1 h 56 min"; rounded to what is worth saying. */
export function formatDuration(durationMs: number): string {
  const seconds = Math.round(durationMs / 1000);
  if (seconds < 100) return withUnit(String(seconds), 's');
  const minutes = Math.round(seconds / 60);
  if (minutes < 60) return withUnit(String(minutes), 'min');
  const rest = minutes % 60;
  const hours = withUnit(String(Math.floor(minutes / 60)), 'h');
  return rest === 0 ? hours : `${hours} ${withUnit(String(rest), 'min')}`;
}
