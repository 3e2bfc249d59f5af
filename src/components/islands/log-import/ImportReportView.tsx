import type { Log } from '~/lib/contracts/logs';
import { formatNumber } from '~/lib/units';

const count = (n: number): string => formatNumber(n);

/** What was read, and what was not and why; the way on to the review. */
export function ImportReportView({ log }: { readonly log: Log }) {
  const { dialect } = log;
  const delimiter = dialect.delimiter === '\t' ? 'tab' : dialect.delimiter;
  return (
    <div className="log-report">
      <p role="status">
        <strong>
          {count(log.acceptedRows)} of {count(log.rows)} rows read
        </strong>
        {log.rejectedRows > 0 ? `, ${count(log.rejectedRows)} left out` : ''}. Times as {dialect.time}
        {dialect.timeZone ? ` in ${dialect.timeZone}` : ''}, columns parted by “{delimiter}”, decimal mark “
        {dialect.decimal}”.
      </p>
      {log.assumptions.length > 0 ? (
        <ul className="hint">
          {log.assumptions.map((text) => (
            <li key={text}>{text}</li>
          ))}
        </ul>
      ) : null}
      <table className="table">
        <thead>
          <tr>
            <th scope="col">Channel</th>
            <th scope="col">What</th>
            <th scope="col" className="right">
              Samples
            </th>
            <th scope="col" className="right">
              Missing
            </th>
            <th scope="col" className="right">
              From, to
            </th>
          </tr>
        </thead>
        <tbody>
          {log.channels.map((channel) => (
            <tr key={channel.id}>
              <th scope="row" data-label="Channel">
                {channel.name}
                {channel.id === log.controlChannelId ? <span className="hint"> · reviewed</span> : null}
              </th>
              <td data-label="What">
                {channel.quantity === 'temperature' || channel.quantity === 'emf'
                  ? channel.role
                  : channel.quantity}
              </td>
              <td data-label="Samples" className="right num">
                {count(channel.samples)}
              </td>
              <td data-label="Missing" className="right num">
                {count(channel.missing)}
              </td>
              <td data-label="From, to" className="right num">
                {channel.min === null || channel.max === null
                  ? '–'
                  : `${formatNumber(channel.min, 1)} to ${formatNumber(channel.max, 1)} ${channel.unit}`}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {log.rejected.length > 0 ? (
        <details>
          <summary className="link">Rows left out, and why</summary>
          <ul className="log-rejected num">
            {log.rejected.map((row) => (
              <li key={row.line}>
                line {row.line}: {row.reason}
              </li>
            ))}
          </ul>
        </details>
      ) : null}
      <p>
        <a className="btn btn-primary" href={`/runs/${log.runId}`}>
          Read the run
        </a>
      </p>
    </div>
  );
}
