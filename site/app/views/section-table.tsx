/** The section in words and figures, for those who do not see the drawing. */
import { shownNumber } from "../numbers";
import type { Drawing } from "../types";
import { words } from "../words/index";

export function SectionTable({ drawing }: { readonly drawing: Drawing }) {
  const { cavity, tip, increments } = drawing;
  return (
    <div class="unseen">
      <p>{words.section.says(shownNumber(cavity.depth_mm), shownNumber(cavity.width_mm), shownNumber(tip.gap_mm))}</p>
      <table>
        <caption>{words.section.table}</caption>
        <thead>
          <tr>
            {words.section.columns.map((column) => (
              <th key={column} scope="col">
                {column}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {increments.map((each) => (
            <tr key={each.number}>
              <th scope="row">{each.number}</th>
              <td>{shownNumber(each.top_mm)}</td>
              <td>{shownNumber(each.bottom_mm)}</td>
              <td>{each.far_shown ?? words.section.farNone}</td>
              <td>{each.short_from_mm === null ? words.section.never : shownNumber(each.short_from_mm)}</td>
              <td>{words.marks[each.finding]}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
