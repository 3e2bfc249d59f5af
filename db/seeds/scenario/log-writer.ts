import type { SimulatedRow } from './firing-simulator';

/** How a demo logger writes its file. Three invented habits, each common in loggers. */
export type LoggerHabit = 'iso-comma' | 'local-semicolon' | 'elapsed-tab';

const two = (value: number) => String(Math.floor(value)).padStart(2, '0');

/** Local wall time of an instant in an IANA zone. */
function wallTime(ms: number, timeZone: string): { date: string; time: string } {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    hourCycle: 'h23',
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
  }).formatToParts(ms);
  const part = (type: string) => parts.find((one) => one.type === type)?.value ?? '';
  return {
    date: `${part('day')}.${part('month')}.${part('year')}`,
    time: `${part('hour')}:${part('minute')}:${part('second')}`,
  };
}

export function writeLog(
  rows: readonly SimulatedRow[],
  startMs: number,
  timeZone: string,
  habit: LoggerHabit,
): string {
  if (habit === 'iso-comma') {
    const lines = rows.map((row) =>
      [
        new Date(startMs + row.timeS * 1000).toISOString().replace('.000Z', 'Z'),
        row.chamberC?.toFixed(1) ?? 'OPEN',
        row.loadC.toFixed(1),
        (row.powerShare * 100).toFixed(0),
      ].join(','),
    );
    return ['time,chamber °C,shell °C,power %', ...lines, ''].join('\n');
  }
  if (habit === 'local-semicolon') {
    const comma = (value: number) => value.toFixed(1).replace('.', ',');
    const lines = rows.map((row) => {
      const { date, time } = wallTime(startMs + row.timeS * 1000, timeZone);
      return [
        `${date} ${time}`,
        row.chamberC === null ? '---' : comma(row.chamberC),
        comma(row.powerShare * 100),
      ].join(';');
    });
    return [
      'Kiln logger;channel list',
      'Thermocouple;type K',
      '',
      'date and time;chamber;power',
      ';°C;%',
      ...lines,
      '',
    ].join('\r\n');
  }
  const lines = rows.map((row) => {
    const clock = `${Math.floor(row.timeS / 3600)}:${two((row.timeS % 3600) / 60)}:${two(row.timeS % 60)}`;
    return [clock, row.chamberC?.toFixed(0) ?? 'OPEN', (row.powerShare * 100).toFixed(0)].join('\t');
  });
  return ['elapsed h:mm:ss\tchamber (°C)\toutput (%)', ...lines, ''].join('\n');
}
