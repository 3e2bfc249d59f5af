export interface StripTableContent {
  readonly caption: string;
  readonly columns: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

/** The chart's figures as a table, for those who do not see it. */
export function StripTable({ content }: { readonly content: StripTableContent }) {
  return (
    <div className="strip-hidden">
      <table>
        <caption>{content.caption}</caption>
        <thead>
          <tr>
            {content.columns.map((column) => (
              <th key={column} scope="col">
                {column}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {content.rows.map((row, index) => (
            <tr key={`${index} ${row[0] ?? ''}`}>
              {row.map((cell, at) =>
                at === 0 ? (
                  <th key={at} scope="row">
                    {cell}
                  </th>
                ) : (
                  <td key={at}>{cell}</td>
                ),
              )}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
