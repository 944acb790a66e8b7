/** A moment in local time with its offset from UTC: '2026-01-05T10:30:00.000+01:00'. */
export function localMoment(date: Date): string {
  const offsetMinutes = -date.getTimezoneOffset();
  const local = new Date(date.getTime() + offsetMinutes * 60_000).toISOString().slice(0, -1);
  const size = Math.abs(offsetMinutes);
  const [hours, minutes] = [Math.floor(size / 60), size % 60].map((n) =>
    String(n).padStart(2, '0'),
  );
  return `${local}${offsetMinutes < 0 ? '-' : '+'}${hours}:${minutes}`;
}
