import { celsiusOf, toCelsius, type Convertible } from './celsius';
import { draftChannels, type ChannelDraft } from './channel-draft';
import type { Columns } from './columns';
import { conclude, type ConcludedChannel } from './conclusion';
import type { Layout } from './layout';
import { OrderKeeper } from './order';
import type { PreambleFacts } from './preamble';
import { NO_ROWS } from './refusal';
import type { RawBlock } from './raw-block';
import { Rejects } from './rejects';
import { RowReader } from './row-reader';
import type { LogEncoding, LogQuestion, ReadChannel } from './schema';
import type { RowView } from './splitter';
import { Statistics, type ChannelStatistics } from './statistics';
import type { TimePlan } from './time-plan';
import { timeReader } from './time-reader';
import type { LogReaderOptions, LogReading } from './types';

/** Share of a file's rows that must be readable for it to be a log at all. */
const FEWEST_READABLE = 0.1;

/** The reading of one table from its first row to its report. */
export class TableReading {
  private readonly drafts: ChannelDraft[];
  private readonly rejects = new Rejects();
  private readonly statistics: Statistics;
  private readonly emfStatistics: Statistics;
  private readonly emfChannels: number[];
  private readonly order: OrderKeeper;
  private readonly rows: RowReader;

  constructor(
    private readonly layout: Layout,
    columns: Columns,
    facts: PreambleFacts,
    private readonly plan: TimePlan,
    private readonly options: LogReaderOptions,
  ) {
    const { choice, settings } = plan;
    this.drafts = draftChannels(columns.columns, choice.timeColumns, facts, options.mapping ?? {});
    this.statistics = new Statistics(this.drafts.length);
    this.emfChannels = this.drafts.flatMap((draft, i) =>
      draft.quantity === 'emf' && draft.thermocouple ? [i] : [],
    );
    this.emfStatistics = new Statistics(this.emfChannels.length);
    this.order = new OrderKeeper({
      channels: this.drafts.length,
      continuity: this.drafts.flatMap(({ quantity, setpoint }, i) =>
        quantity !== 'power' && quantity !== 'other' && !setpoint ? [i] : [],
      ),
      counter: choice.source.kind === 'elapsed' || choice.source.kind === 'duration',
      emit: (block) => this.emit(block),
      onDuplicate: (line, ofLine) => this.rejects.add(line, `repeats line ${ofLine}`),
    });
    this.rows = new RowReader({
      layout,
      channels: this.drafts.map(({ column }) => column),
      timeColumns: sourceColumns(plan),
      time: timeReader(choice.source, settings),
      timeless: choice.source.kind === 'row',
      decimal: columns.decimal,
      decimalKnown: columns.decimalKnown,
      rejects: this.rejects,
      emit: (block) => this.order.accept(block),
    });
  }

  get channelCount(): number {
    return this.drafts.length;
  }

  take(row: RowView): void {
    this.rows.take(row);
  }

  /** Ends the table. Call once. */
  conclude(bytes: number, encoding: LogEncoding): LogReading {
    this.rows.end();
    this.order.finish();
    const accepted = this.rows.rows - this.rejects.count;
    if (accepted <= 0 || accepted < FEWEST_READABLE * this.rows.rows) return { ok: false, refusal: NO_ROWS };
    const { mapping = {} } = this.options;
    const dates = this.dateQuestion();
    if (dates !== null && 'again' in dates) return { ok: false, again: { ...mapping, ...dates.again } };
    const conclusion = conclude(this.drafts, this.statistics.channels, mapping);
    const questions = [...(dates ? [dates.question] : []), ...this.plan.questions, ...conclusion.questions];
    if (questions.length > 0) return { ok: false, questions };
    const stepMs = this.order.medianStepMs();
    return {
      ok: true,
      report: {
        bytes,
        rows: this.rows.rows,
        acceptedRows: accepted,
        rejectedRows: this.rejects.count,
        rejected: this.rejects.list(),
        dialect: {
          encoding,
          delimiter: this.layout.delimiter,
          decimal: this.rows.decimal,
          headerLine: this.layout.headerLine,
          time: this.plan.pattern,
          timeKind: this.plan.kind,
          timeZone: this.plan.timeZone,
        },
        channels: conclusion.channels.map((channel, i) =>
          this.channelReport(channel, i, conclusion.channels),
        ),
        controlChannel: conclusion.control,
        firstAt: instantText(this.statistics.firstMs),
        lastAt: instantText(this.statistics.lastMs),
        intervalS: Number.isNaN(stepMs) ? null : stepMs / 1000,
        clockEvents: this.order.clockEvents,
        assumptions: [...this.plan.assumptions, ...conclusion.assumptions],
        blockOrder: this.order.window.blockOrder,
      },
    };
  }

  private emit(block: RawBlock): void {
    this.statistics.add(block);
    if (this.emfChannels.length > 0) this.emfStatistics.add({ ...block, values: this.emfInCelsius(block) });
    this.options.sink(block);
  }

  private emfInCelsius(block: RawBlock): Float64Array[] {
    return this.emfChannels.map((index) => {
      const own = this.drafts[index];
      const from = own?.junction && 'channel' in own.junction ? own.junction.channel : index;
      const pair = [convertible(own, { channel: 1 }), convertible(this.drafts[from], null)];
      const [emf] = toCelsius(pair, [
        block.values[index] ?? new Float64Array(0),
        block.values[from] ?? new Float64Array(0),
      ]);
      return emf ?? new Float64Array(block.rows).fill(NaN);
    });
  }

  /** Whether the dates of the whole file leave their order open, or settle it otherwise than it was read. */
  private dateQuestion(): { question: LogQuestion } | { again: { dateOrder: 'dmy' | 'mdy' | 'ymd' } } | null {
    const { evidence, settings } = this.plan;
    if (this.options.mapping?.dateOrder) return null;
    const orders = evidence.orders();
    const [only] = orders;
    if (orders.length === 1 && only) return only === settings.order ? null : { again: { dateOrder: only } };
    if (orders.length < 2) return null;
    const choices = orders.map((order) => ({ value: order, example: evidence.example(order) }));
    return { question: { field: 'dateOrder', choices, guess: settings.order } };
  }

  private channelReport(
    channel: ConcludedChannel,
    index: number,
    all: readonly ConcludedChannel[],
  ): ReadChannel {
    const own = this.statistics.channels[index];
    const emf = this.emfStatistics.channels[this.emfChannels.indexOf(index)];
    const { quantity, role, unit, thermocouple, junction } = channel;
    const shape: Convertible = { quantity, unit, thermocouple, junction };
    const degrees = (value: number | undefined): number | null => {
      const tempC = quantity === 'temperature' ? celsiusOf(shape, value ?? NaN, NaN) : NaN;
      return finite(tempC);
    };
    return {
      name: channel.column.name,
      column: channel.column.index,
      quantity,
      role,
      unit,
      thermocouple: quantity === 'temperature' || quantity === 'emf' ? thermocouple : null,
      junction: quantity === 'emf' && all.length > 0 ? junction : null,
      samples: own?.samples ?? 0,
      missing: own?.missing ?? 0,
      min: finite(own?.min),
      max: finite(own?.max),
      ...(quantity === 'emf'
        ? extremesC(emf)
        : {
            minC: degrees(own?.min),
            maxC: degrees(own?.max),
            firstC: degrees(own?.firstValue),
            lastC: degrees(own?.lastValue),
          }),
      firstAt: instantText(own?.firstMs),
      lastAt: instantText(own?.lastMs),
      markers: this.rows.markers[index]?.list() ?? [],
    };
  }
}

function sourceColumns({ choice: { source } }: TimePlan): number[] {
  if (source.kind === 'row') return [];
  return source.kind === 'date-and-clock' ? [source.dateColumn, source.clockColumn] : [source.column];
}

const convertible = (draft: ChannelDraft | undefined, junction: Convertible['junction']): Convertible => ({
  quantity: draft?.quantity ?? 'temperature',
  unit: draft?.unit ?? 'C',
  thermocouple: draft?.thermocouple ?? null,
  junction: draft?.junction && 'tempC' in draft.junction ? draft.junction : junction,
});

function extremesC(
  emf: ChannelStatistics | undefined,
): Pick<ReadChannel, 'minC' | 'maxC' | 'firstC' | 'lastC'> {
  return {
    minC: finite(emf?.min),
    maxC: finite(emf?.max),
    firstC: finite(emf?.firstValue),
    lastC: finite(emf?.lastValue),
  };
}

const finite = (value: number | undefined): number | null =>
  value !== undefined && Number.isFinite(value) ? value : null;

const instantText = (ms: number | undefined): string | null =>
  ms !== undefined && Number.isFinite(ms) ? new Date(ms).toISOString() : null;
