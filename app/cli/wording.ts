import type { StudyIssue } from '../contract/requests';

/** What was refused, every issue with its place, and what to do about it. */
export function refusalText(subject: string, issues: readonly StudyIssue[]): string {
  const lines = issues.map(({ place, message, remedy }) => {
    // many messages begin with the place themselves
    const prefix = message.toLowerCase().startsWith(place.toLowerCase()) ? '' : `${place}: `;
    return `  ${prefix}${message}\n    ${remedy}`;
  });
  return [`farwell: ${subject} was refused.`, ...lines].join('\n');
}

/** `3 points`, `1 point` */
export function counted(count: number, thing: string): string {
  return `${count} ${thing}${count === 1 ? '' : 's'}`;
}

/** A number with its thousands set apart: `3,136`. Node's own way takes 30 ms to get ready. */
export function grouped(value: number): string {
  const [whole = '', fraction] = String(value).split('.');
  const groups = whole.replace(/\B(?=(\d{3})+$)/g, ',');
  return fraction === undefined ? groups : `${groups}.${fraction}`;
}

/** A duration in words, to the precision that an estimate has: `under 1 s`, `25 s`, `3 min`, `2 h 10 min`. */
export function durationText(seconds: number): string {
  if (seconds < 1) return 'under 1 s';
  if (seconds < 90) return `${Math.round(seconds)} s`;
  const minutes = Math.round(seconds / 60);
  if (minutes < 90) return `${minutes} min`;
  const tenMinutes = Math.round(minutes / 10);
  const hours = Math.floor(tenMinutes / 6);
  if (hours >= 48) return `${grouped(Math.round(hours / 24))} days`;
  return tenMinutes % 6 === 0 ? `${hours} h` : `${hours} h ${(tenMinutes % 6) * 10} min`;
}

/** `64 kB`, `1.5 GB` */
export function bytesText(bytes: number): string {
  const units = ['kB', 'MB', 'GB', 'TB', 'PB'];
  const power = Math.max(0, Math.min(units.length - 1, Math.floor(Math.log10(bytes) / 3) - 1));
  const value = bytes / 1000 ** (power + 1);
  return `${value < 0.1 ? 'under 0.1' : grouped(Number(value.toPrecision(2)))} ${units[power]}`;
}

/** Lines with columns of equal width: the first to the left, the others to the right. */
export function alignedTable(rows: readonly (readonly string[])[]): string {
  const widths = (rows[0] ?? []).map((_, column) => Math.max(...rows.map((row) => row[column]?.length ?? 0)));
  return rows
    .map((row) =>
      row
        .map((cell, column) =>
          column === 0 ? cell.padEnd(widths[0] ?? 0) : cell.padStart(widths[column] ?? 0),
        )
        .join('   ')
        .trimEnd(),
    )
    .join('\n');
}
