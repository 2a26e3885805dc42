/** Beside the section, on its own depth scale: the share of need at every depth, and the figure at each far side. */
import { shownNumber } from "../numbers";
import type { DrawnIncrement, Drawing } from "../types";
import { words } from "../words/index";
import { MarkAt } from "./mark";
import { shareAxis, type Scale } from "./section-scale";

/** Short forms, so that the axis has room. */
const FRACTIONS: Readonly<Record<number, string>> = { 0.5: "½", 0.25: "¼", 0.125: "⅛", 0.0625: "1⁄16" };

/** The height that a figure needs; in thinner increments only the chosen one has it. */
const LINE = 17;

interface PlotProps {
  readonly drawing: Drawing;
  readonly scale: Scale;
  readonly selected: number;
}

export function Plot({ drawing, scale, selected }: PlotProps) {
  const axis = shareAxis(drawing, scale);
  const top = scale.y(Math.min(0, drawing.increments.at(-1)?.top_mm ?? 0));
  const bottom = scale.y(drawing.cavity.depth_mm);
  const wall = scale.x(drawing.cavity.width_mm / 2);
  const need = axis.at(1);
  const roomy = axis.at(2) - need >= 16;
  return (
    <g class="plot" aria-hidden="true">
      <rect
        class="plot-ground"
        x={scale.plotLeft}
        y={top}
        width={scale.plotRight - scale.plotLeft}
        height={bottom - top}
      />
      {axis.ticks.map((tick) => (
        <g key={tick}>
          <path
            class={tick === 1 ? "need-line" : "plot-line"}
            d={`M${axis.at(tick)} ${tick === 1 ? top - 8 : top}V${bottom + 4}`}
          />
          {(tick >= 1 || roomy) && (
            <text x={axis.at(tick)} y={bottom + 18} text-anchor="middle">
              {FRACTIONS[tick] ?? shownNumber(tick)}
            </text>
          )}
        </g>
      ))}
      <text class="need-word" x={need} y={top - 13} text-anchor="middle">
        {words.section.need}
      </text>
      {words.section.axis.map((word, line) => (
        <text key={word} x={scale.plotRight} y={bottom + 38 + 17 * line} text-anchor="end">
          {word}
        </text>
      ))}
      {drawing.increments.map((increment, index) => (
        <Curve
          key={increment.number}
          increment={increment}
          scale={scale}
          at={axis.at}
          wall={wall}
          chosen={index === selected}
        />
      ))}
    </g>
  );
}

interface CurveProps {
  readonly increment: DrawnIncrement;
  readonly scale: Scale;
  readonly at: (share: number) => number;
  readonly wall: number;
  readonly chosen: boolean;
}

function Curve({ increment, scale, at, wall, chosen }: CurveProps) {
  const {
    top_mm: top,
    bottom_mm: bottom,
    profile,
    far_share: far,
    far_shown: shown,
    short_from_mm: short,
    finding,
  } = increment;
  const y = scale.y(bottom);
  const points = profile.map(([depth, share]) => `${at(share).toFixed(1)} ${scale.y(top + depth).toFixed(1)}`);
  const roomy = (bottom - top) * scale.perMm >= LINE || chosen;
  const lacking = far !== null && far < 1;
  const lack = profile
    .filter(([depth]) => short !== null && depth >= short)
    .map(([depth, share]) => `${at(share).toFixed(1)} ${scale.y(top + depth).toFixed(1)}`);
  return (
    <g class={chosen ? "curve chosen" : "curve"}>
      <path class="leader" d={`M${wall} ${y}H${scale.plotRight}`} />
      {short !== null && lack.length > 0 && (
        <path fill="url(#hatch)" d={`M${at(1)} ${scale.y(top + short)}L${lack.join("L")}L${at(1)} ${y}z`} />
      )}
      {points.length > 1 && <path class="curve-line" d={`M${points.join("L")}`} />}
      {far !== null && <circle class={lacking ? "far stop" : "far"} cx={at(far)} cy={y} r="4" />}
      {roomy && (
        <text class={lacking ? "far-word stop" : "far-word"} x={scale.plotLeft - 8} y={y - 5} text-anchor="end">
          {shown ?? "–"}
        </text>
      )}
      {roomy && <MarkAt mark={finding} x={scale.toothRight + 9} y={y - 10} />}
    </g>
  );
}
