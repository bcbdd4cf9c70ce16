import { useId } from 'preact/hooks';
import { formatLongDate, timeOf } from '../format';
import type { CalendarResult } from '../model/answer';
import { built } from '../store/calculation';
import { coreVersion } from '../store/signals';
import { useAnswer } from '../store/use-answer';

type Month = CalendarResult['months'][number];
type Special = CalendarResult['days'][number];

const weekdays = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'];
const dayMilliseconds = 86_400_000;

function isoOf(time: number): string {
  return new Date(time).toISOString().slice(0, 10);
}

/** The days of a month by weeks from Monday; null before its first and after its last. */
function weeksOf({ first }: Month): readonly (readonly (string | null)[])[] {
  const start = timeOf(first);
  const before = (new Date(start).getUTCDay() + 6) % 7;
  const days: (string | null)[] = Array.from({ length: before }, () => null);
  for (let time = start; isoOf(time).slice(0, 7) === first.slice(0, 7); time += dayMilliseconds) days.push(isoOf(time));
  while (days.length % 7 !== 0) days.push(null);
  return Array.from({ length: days.length / 7 }, (_, week) => days.slice(week * 7, week * 7 + 7));
}

/** What is special about a day, in words; empty where nothing is. */
function said(day: Special | undefined): string {
  if (day === undefined) return '';
  const names = day.centres.map(({ code, name }) => `${name} (${code})`).join(', ');
  if (day.open) return names === '' ? 'open by your own list' : `open by your own list, though ${names}`;
  return day.own ? 'closed by your own list' : names;
}

function MonthTable({ month, special, today }: { month: Month; special: ReadonlyMap<string, Special>; today: string }) {
  return (
    <table class="month">
      <caption>
        {formatLongDate(month.first).split(' ').slice(2).join(' ')}
        <small> {month.businessDays} business days</small>
      </caption>
      <thead>
        <tr>
          {weekdays.map((name) => (
            <th key={name} scope="col" abbr={name}>
              {name.slice(0, 2)}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {weeksOf(month).map((week) => (
          <tr key={week.find((day) => day !== null)}>
            {week.map((day, index) => {
              if (day === null) return <td key={index} />;
              const found = special.get(day);
              const weekend = index > 4;
              const closed = found === undefined ? weekend : !found.open;
              const third =
                day === month.thirdWednesday ? 'third Wednesday' : day === month.thirdFriday ? 'third Friday' : '';
              const words = [day === today && 'today', said(found), third].filter(Boolean).join(', ');
              return (
                <td
                  key={index}
                  class={[
                    closed && (weekend ? 'weekend' : 'closed'),
                    found?.open === true && 'opened',
                    third !== '' && 'third',
                    day === today && 'today',
                  ]
                    .filter(Boolean)
                    .join(' ')}
                  title={words || undefined}
                >
                  {Number(day.slice(8))}
                  {words !== '' && <span class="sr-only"> {words}</span>}
                </td>
              );
            })}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** The asset's business days for the next eighteen months, why it is closed when it is, and when what is dealt settles. */
export function CalendarView() {
  const id = useId();
  const { market } = built.value.request;
  const { result, errors, stale } = useAnswer<CalendarResult>(
    coreVersion.value === '' ? null : { format: 'forwright/1', task: 'calendar', market, months: 18 },
  );
  const special = new Map(result?.days.map((day) => [day.date, day]));
  return (
    <section class="block" aria-labelledby={`${id}-name`} data-stale={stale}>
      <h2 id={`${id}-name`}>Calendar</h2>
      {errors.map((fault) => (
        <p class="notice wrong" key={`${fault.at} ${fault.code}`}>
          {fault.message}
        </p>
      ))}
      {result !== null && (
        <>
          <p class="muted">
            {market.asset.calendars === undefined || market.asset.calendars.length === 0
              ? 'Weekends only'
              : market.asset.calendars.join(' and ')}
            . Crossed out: closed. Framed: open by your own list. Underlined: third Wednesday and third Friday. Further
            holidays are typed under Conventions.
          </p>
          <div class="months">
            {result.months.map((month) => (
              <MonthTable key={month.first} month={month} special={special} today={market.asOf} />
            ))}
          </div>
          <div class="pictures">
            <div class="table-frame" tabIndex={0} role="region" aria-label="Closed days">
              <table class="table">
                <thead>
                  <tr>
                    <th scope="col">Weekdays closed, and days opened</th>
                    <th scope="col">Why</th>
                  </tr>
                </thead>
                <tbody>
                  {result.days.map((day) => (
                    <tr key={day.date}>
                      <th scope="row">{formatLongDate(day.date)}</th>
                      <td>{said(day)}</td>
                    </tr>
                  ))}
                </tbody>
              </table>
            </div>
            <div class="table-frame" tabIndex={0} role="region" aria-label="When what is dealt settles">
              <table class="table">
                <thead>
                  <tr>
                    <th scope="col">Dealt on</th>
                    <th scope="col">Settles on</th>
                  </tr>
                </thead>
                <tbody>
                  {result.dealings.map(({ dealt, settles }) => (
                    <tr key={dealt}>
                      <th scope="row">{formatLongDate(dealt)}</th>
                      <td>{formatLongDate(settles)}</td>
                    </tr>
                  ))}
                </tbody>
              </table>
            </div>
          </div>
        </>
      )}
    </section>
  );
}
