/** The chair clock in words and figures. */
import { shownNumber } from "../numbers";
import type { ClockStep, Drawing } from "../types";
import { words } from "../words/index";

export function ClockTable({ drawing }: { readonly drawing: Drawing }) {
  return (
    <div class="unseen">
      <table>
        <caption>{words.clock.table}</caption>
        <thead>
          <tr>
            {words.clock.columns.map((column) => (
              <th key={column} scope="col">
                {column}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {drawing.clock.map((step, index) => (
            <tr key={index}>
              <th scope="row">{named(step)}</th>
              <td>{shownNumber(step.start_s)}</td>
              <td>{shownNumber(step.length_s)}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <table>
        <caption>{words.clock.windows}</caption>
        <thead>
          <tr>
            {words.clock.windowColumns.map((column) => (
              <th key={column} scope="col">
                {column}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {drawing.window_s.map(({ number, window_s: window, placing_s: placing }) => (
            <tr key={number}>
              <th scope="row">{number}</th>
              <td>{window === null ? words.section.farNone : shownNumber(Number(window.toFixed(1)))}</td>
              <td>{placing === null ? words.section.farNone : shownNumber(placing)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function named(step: ClockStep): string {
  return `${words.clock.layers[step.layer]} ${step.number ?? ""} ${words.clock.does[step.what]}`.replace(/\s+/g, " ");
}
