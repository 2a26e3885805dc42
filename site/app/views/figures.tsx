/** A table of figures that stands in words for a drawing. */
interface FiguresProps {
  readonly caption: string;
  readonly columns: readonly string[];
  /** Each row's head, then its cells. */
  readonly rows: readonly (readonly [string | number, ...(string | number)[]])[];
}

export function Figures({ caption, columns, rows }: FiguresProps) {
  return (
    <table>
      <caption>{caption}</caption>
      <thead>
        <tr>
          {columns.map((column) => (
            <th key={column} scope="col">
              {column}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map(([head, ...cells], row) => (
          <tr key={row}>
            <th scope="row">{head}</th>
            {cells.map((cell, column) => (
              <td key={column}>{cell}</td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
