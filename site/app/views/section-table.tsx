/** The section in words and figures, for those who do not see the drawing. */
import { shownNumber } from "../numbers";
import type { Drawing } from "../types";
import { words } from "../words/index";
import { Figures } from "./figures";

export function SectionTable({ drawing }: { readonly drawing: Drawing }) {
  const { cavity, tip, increments } = drawing;
  return (
    <div class="unseen">
      <p>{words.section.says(shownNumber(cavity.depth_mm), shownNumber(cavity.width_mm), shownNumber(tip.gap_mm))}</p>
      <Figures
        caption={words.section.table}
        columns={words.section.columns}
        rows={increments.map((each) => [
          each.number,
          shownNumber(each.top_mm),
          shownNumber(each.bottom_mm),
          each.far_shown ?? words.section.farNone,
          each.short_from_mm === null ? words.section.never : shownNumber(each.short_from_mm),
          words.marks[each.finding],
        ])}
      />
    </div>
  );
}
