/** A moment as a data set writes it: date, time and the offset of both from UTC. */
export interface Moment {
  /** DA: '20260105'. */
  readonly date: string;
  /** TM: '093000.120'. */
  readonly time: string;
  /** Timezone Offset From UTC (0008,0201): '+0100'; undefined where it is not stated. */
  readonly offset?: string;
}

const ISO_MOMENT =
  /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2}):(\d{2})(\.\d{1,6})?\d*(Z|[+-]\d{2}:\d{2})?$/;

/** An ISO 8601 date and time, digits as written: the offset is kept and never worked in. Undefined for anything else. */
export function momentOf(iso: string): Moment | undefined {
  const [, year, month, day, hour, minute, second, fraction = '', zone] =
    ISO_MOMENT.exec(iso) ?? [];
  if (year === undefined) return undefined;
  return {
    date: `${year}${month}${day}`,
    time: `${hour}${minute}${second}${fraction}`,
    ...(zone === undefined ? {} : { offset: zone === 'Z' ? '+0000' : zone.replace(':', '') }),
  };
}

/** A moment as DT: '20260105093000.120+0000'; empty for what is no moment. */
export function dateTimeText(iso: string): string {
  const moment = momentOf(iso);
  return moment === undefined ? '' : `${moment.date}${moment.time}${moment.offset ?? ''}`;
}

/** Stands where a document needs a date and a de-identified one must not tell it (PS3.15 E, action D). */
export const DUMMY_MOMENT: Moment = { date: '19000101', time: '000000' };
