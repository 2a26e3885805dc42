/** The lamp's tip over the cavity as the increment in hand is exposed: gap, tilt, aim, its axis and its edges. */
import { shownNumber } from "../numbers";
import type { Drawing } from "../types";
import { words } from "../words/index";
import type { Scale } from "./section-scale";

interface TipProps {
  readonly drawing: Drawing;
  readonly scale: Scale;
  readonly tilt: number;
  readonly offset: number;
  /** Whether the exposure comes from a side, which this section does not show. */
  readonly side: boolean;
}

export function Tip({ drawing, scale, tilt, offset, side }: TipProps) {
  const { tip, cavity } = drawing;
  const half = (tip.diameter_mm / 2) * scale.perMm;
  const x = scale.x(offset);
  const y = scale.y(-tip.gap_mm);
  const turn = (tilt * Math.PI) / 180;
  const edge = (sign: 1 | -1) => [x + sign * half * Math.cos(turn), y - sign * half * Math.sin(turn)] as const;
  const [left, right] = [edge(-1), edge(1)];
  const mouth = Math.min(cavity.width_mm, tip.diameter_mm * 2) / 2;
  const axis = (tip.gap_mm * scale.perMm) / Math.max(0.2, Math.cos(turn));
  return (
    <g class={side ? "tip aside" : "tip"} aria-hidden="true">
      <path
        class="beam-edge"
        d={`M${left.join(" ")}L${scale.x(-mouth)} ${scale.y(0)}M${right.join(" ")}L${scale.x(mouth)} ${scale.y(0)}`}
      />
      <g transform={`rotate(${-tilt} ${x} ${y})`}>
        <path class="tip-body" d={`M${x - half} ${y}v${-scale.tipBody + 12}q0 -8 8 -8H${x + half - 8}q8 0 8 8V${y}z`} />
        <path class="tip-face" d={`M${x - half} ${y - 5}h${2 * half}v5h${-2 * half}z`} />
        <text class="tip-word" x={x} y={y - 12} text-anchor="middle">
          {words.section.tip(shownNumber(tip.diameter_mm))}
        </text>
        <path class="axis" d={`M${x} ${y}v${axis}`} />
      </g>
    </g>
  );
}
