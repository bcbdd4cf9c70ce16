// The calendars of the core against the npm package date-holidays, 2000 to 2035. That package lists public holidays of
// countries, not the closing days of banks and exchanges, and knows few days that were moved or declared for one year: so each
// disagreement has to be explained here by a rule, and every explanation has to be needed.

import { execFileSync } from 'node:child_process';
import { resolve } from 'node:path';
import Holidays from 'date-holidays';
import { describe, expect, test } from 'vitest';
import { buildFolder } from '../page/driver/built';

const firstYear = 2000;
const lastYear = 2035;

/** Weekdays, as ISO dates, with the name of the holiday. */
type ClosedDays = Map<string, string>;

interface Explanation {
  /** Which of the two alone is closed. */
  only: 'core' | 'package';
  /** The holidays concerned, by name. */
  names: RegExp;
  /** The days, where they are no whole rule. */
  days?: string[];
  why: string;
}

interface Comparison {
  /** Where the package looks: country, and state or region. */
  place: [string, string?];
  /** Which of its holidays count. */
  types: string[];
  explained: Explanation[];
}

const substituteOnFriday: Explanation = {
  only: 'package',
  names: /\(substitute day\)/,
  why: 'federal offices keep a Saturday holiday on Friday; the Reserve Banks do not move it (5 U.S.C. 6103 is for offices)',
};

const comparisons: Record<string, Comparison> = {
  EUTA: {
    place: ['DE'],
    types: ['public'],
    explained: [
      {
        only: 'package',
        names: /Himmelfahrt|Pfingstmontag|Einheit|Reformationstag/,
        why: 'holidays of Germany on which TARGET is open',
      },
      {
        only: 'core',
        names: /^31 December$/,
        days: ['2001-12-31'],
        why: 'closed for the change to euro notes',
      },
    ],
  },
  USNY: { place: ['US'], types: ['public', 'bank'], explained: [substituteOnFriday] },
  NYSE: {
    place: ['US'],
    types: ['public'],
    explained: [
      { only: 'core', names: /^Good Friday$/, why: 'no federal holiday; the exchange is closed' },
      {
        only: 'core',
        names: /^(Closed after|Mourning|Hurricane)/,
        why: 'closed for one day or a few by the exchange',
      },
      {
        only: 'package',
        names: /^(Columbus|Veterans) Day$/,
        why: 'shares are dealt on these federal holidays',
      },
      {
        only: 'package',
        names: /^New Year's Day \(substitute day\)/,
        why: 'the exchange keeps no holiday on the last day of an accounting period',
      },
      { only: 'package', names: /^Juneteenth/, days: ['2021-06-18'], why: 'kept by the exchange since 2022' },
    ],
  },
  GBLO: {
    place: ['GB', 'ENG'],
    types: ['public', 'bank'],
    explained: [
      {
        only: 'core',
        names: /Jubilee|moved/,
        days: ['2002-06-03', '2002-06-04', '2012-06-04'],
        why: 'by proclamation: the spring bank holiday moved beside a jubilee',
      },
      {
        only: 'package',
        names: /^Spring/,
        days: ['2002-05-27', '2012-05-28'],
        why: 'the days it was moved from',
      },
      { only: 'core', names: /^Wedding/, days: ['2011-04-29'], why: 'by proclamation' },
    ],
  },
  JPTO: {
    place: ['JP'],
    types: ['public', 'bank'],
    explained: [
      {
        only: 'core',
        names: /between/,
        days: ['2032-09-21'],
        why: 'between 20 September, third Monday, and the equinox on the 22nd: art. 3(3) of the Act on National Holidays',
      },
    ],
  },
  CHZU: {
    place: ['CH', 'ZH'],
    types: ['public', 'bank'],
    explained: [{ only: 'core', names: /^Berchtold/, why: 'banks and exchange are closed; the canton has no holiday' }],
  },
  CATO: {
    place: ['CA', 'ON'],
    types: ['public', 'bank'],
    explained: [
      {
        only: 'core',
        names: /^(New Year's|Canada|Christmas|Boxing) Day$/,
        why: "banks keep a weekend's holiday on the next weekday; the package does not move it",
      },
      {
        only: 'core',
        names: /^(Civic Holiday|Remembrance Day|National Day for Truth)/,
        why: 'banks are closed; Ontario has no public holiday',
      },
      { only: 'package', names: /^Easter Monday$/, why: 'a holiday of federal offices; banks are open' },
      { only: 'package', names: /^Family Day$/, why: 'Ontario has it since 2008' },
    ],
  },
  AUSY: {
    place: ['AU', 'NSW'],
    types: ['public', 'bank'],
    explained: [
      {
        only: 'package',
        names: /^Anzac Day \(substitute day\)/,
        why: 'New South Wales does not move it; additional days were declared for 2026 and 2027 only',
      },
      {
        only: 'core',
        names: /^Anzac/,
        days: ['2011-04-26'],
        why: 'on Easter Monday of that year: one day was added',
      },
    ],
  },
  HKHK: {
    place: ['HK'],
    types: ['public', 'bank'],
    explained: [
      {
        only: 'package',
        names: /初四|中秋節後第二日/,
        days: ['2000-02-08', '2003-02-04', '2006-02-01', '2007-02-21', '2010-02-17', '2002-09-23', '2009-10-05'],
        why: 'a Sunday was made up for by the day before until the Amendment Ordinance 2011',
      },
      {
        only: 'core',
        names: /^Day preceding/,
        days: ['2000-02-04', '2003-01-31'],
        why: 'that day before, on a weekday',
      },
      {
        only: 'core',
        names: /^(Ching Ming|Day following the Mid-Autumn)/,
        days: ['2010-04-06', '2015-04-07', '2012-10-02'],
        why: 'two holidays on one day, or a Sunday before another holiday: the next day that is free',
      },
      { only: 'core', names: /^70th/, days: ['2015-09-03'], why: 'declared for that year' },
      {
        only: 'core',
        names: /^(Day following the Mid-Autumn|Chung Yeung)/,
        days: ['2033-09-09', '2033-10-03'],
        why: 'the leap month of 2033 follows the eleventh month; the package puts one before the autumn festivals',
      },
      { only: 'package', names: /^重陽節/, days: ['2033-10-31'], why: 'the same leap month' },
    ],
  },
};

function sorted(days: Iterable<string>): string[] {
  return [...days].sort();
}

function isWeekday(date: string): boolean {
  const weekday = new Date(`${date}T00:00:00Z`).getUTCDay();
  return weekday >= 1 && weekday <= 5;
}

function closedByCore(): Map<string, ClosedDays> {
  const dump = resolve(buildFolder, 'forwright_calendar_dump');
  const centres = new Map<string, ClosedDays>();
  for (const line of execFileSync(dump, [String(firstYear), String(lastYear)], { encoding: 'utf8' })
    .trim()
    .split('\n')) {
    const [centre = '', date = '', name = ''] = line.split('\t');
    const days = centres.get(centre) ?? new Map<string, string>();
    centres.set(centre, days.set(date, name));
  }
  return centres;
}

function closedByPackage({ place: [country, region], types }: Comparison): ClosedDays {
  const holidays = region === undefined ? new Holidays(country) : new Holidays(country, region);
  const days: ClosedDays = new Map();
  for (let year = firstYear; year <= lastYear; ++year) {
    for (const { date, name, type } of holidays.getHolidays(year)) {
      const day = date.slice(0, 10);
      if (types.includes(type) && isWeekday(day)) {
        days.set(day, name);
      }
    }
  }
  return days;
}

function explains(explanation: Explanation, only: Explanation['only'], date: string, name: string): boolean {
  const dayFits = explanation.days?.includes(date) ?? true;
  return explanation.only === only && explanation.names.test(name) && dayFits;
}

describe('closing days of 2000 to 2035 against date-holidays', () => {
  const core = closedByCore();

  test.each(Object.entries(comparisons))('%s', (centre, comparison) => {
    const ours = core.get(centre) ?? new Map<string, string>();
    const theirs = closedByPackage(comparison);
    const disagreements = [
      ...[...ours].filter(([date]) => !theirs.has(date)).map(([date, name]) => ({ only: 'core' as const, date, name })),
      ...[...theirs]
        .filter(([date]) => !ours.has(date))
        .map(([date, name]) => ({ only: 'package' as const, date, name })),
    ];
    const fits = (explanation: Explanation) =>
      disagreements.filter((d) => explains(explanation, d.only, d.date, d.name));

    const explained = new Set(comparison.explained.flatMap(fits));
    expect(disagreements.filter((disagreement) => !explained.has(disagreement))).toEqual([]);
    for (const explanation of comparison.explained) {
      const days = fits(explanation).map(({ date }) => date);
      expect(days, explanation.why).not.toEqual([]);
      expect(sorted(explanation.days ?? days), explanation.why).toEqual(sorted(days));
    }
    // Four holidays a year at the least are the same.
    expect([...ours.keys()].filter((date) => theirs.has(date)).length).toBeGreaterThan(4 * (lastYear - firstYear));
  });

  test('settlement of United States securities is closed when the exchange or the Reserve Banks are', () => {
    const days = (centre: string) => [...(core.get(centre)?.keys() ?? [])];
    expect(sorted(days('US-SECURITIES'))).toEqual(sorted(new Set([...days('NYSE'), ...days('USNY')])));
  });

  test('every centre is held against something', () => {
    expect(sorted(core.keys())).toEqual(sorted([...Object.keys(comparisons), 'US-SECURITIES']));
  });
});
