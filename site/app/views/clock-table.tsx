/** The chair clock in words and figures. */
import { shownNumber } from "../numbers";
import type { ClockStep, Drawing } from "../types";
import { words } from "../words/index";
import { Figures } from "./figures";

export function ClockTable({ drawing }: { readonly drawing: Drawing }) {
  return (
    <div class="unseen">
      <Figures
        caption={words.clock.table}
        columns={words.clock.columns}
        rows={drawing.clock.map((step) => [named(step), shownNumber(step.start_s), shownNumber(step.length_s)])}
      />
      <Figures
        caption={words.clock.windows}
        columns={words.clock.windowColumns}
        rows={drawing.window_s.map(({ number, window_s: window, placing_s: placing }) => [
          number,
          window === null ? words.section.farNone : shownNumber(Number(window.toFixed(1))),
          placing === null ? words.section.farNone : shownNumber(placing),
        ])}
      />
    </div>
  );
}

function named(step: ClockStep): string {
  return `${words.clock.layers[step.layer]} ${step.number ?? ""} ${words.clock.does[step.what]}`.replace(/\s+/g, " ");
}
