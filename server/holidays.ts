import type { LocalDate } from '@/protocols/types';

export interface Holiday {
  date: LocalDate;
  name: string;
}

const cache = new Map<string, Holiday[]>();

/**
 * Public holidays of a country and region in the years given, from the date-holidays collection. Loaded only when
 * first asked, since it is large. A country or region that it does not know has none.
 */
export async function holidaysOf(country: string, region: string | null, years: readonly number[]): Promise<Holiday[]> {
  const wanted = years.filter((year) => !cache.has(`${country}|${region ?? ''}|${year}`));
  if (wanted.length > 0) {
    const { default: Holidays } = await import('date-holidays');
    const found = region ? new Holidays(country, region) : new Holidays(country);
    for (const year of wanted) {
      const list = found.getHolidays(year).filter((holiday) => holiday.type === 'public');
      cache.set(
        `${country}|${region ?? ''}|${year}`,
        list.map((holiday) => ({ date: holiday.date.slice(0, 10), name: holiday.name })),
      );
    }
  }
  return years.flatMap((year) => cache.get(`${country}|${region ?? ''}|${year}`) ?? []);
}
