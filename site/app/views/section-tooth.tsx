/** The tooth in section: enamel, dentine, the pulp at the depth entered, and the empty box. */
import { shownMm } from "../numbers";
import type { Drawing } from "../types";
import { words } from "../words/index";
import type { Scale } from "./section-scale";

interface ToothProps {
  readonly drawing: Drawing;
  readonly scale: Scale;
}

export function Tooth({ drawing, scale }: ToothProps) {
  const { cavity } = drawing;
  const half = cavity.width_mm / 2;
  const [floor, wall] = [cavity.depth_mm, scale.wallMm];
  const end = scale.bottom;
  const pulpTop = scale.y(floor + scale.dentineMm);
  const known = cavity.remaining_dentine_mm !== null;
  const p = (x: number, y: number) => `${scale.x(x).toFixed(1)} ${scale.y(y).toFixed(1)}`;
  const shell = (inset: number, rise: number) => {
    const outer = half + wall - inset;
    return [
      `M${scale.x(-outer + 0.5)} ${end}`,
      `C${p(-outer - 0.2, floor * 0.7)} ${p(-outer - 0.1, 0.9 + inset)} ${p(-outer + 0.25, 0.2 + inset)}`,
      `C${p(-outer + 0.6, rise)} ${p(-half - 0.7, rise - 0.1)} ${p(-half, inset * 0.7)}`,
      `L${p(-half, floor)} L${p(half, floor)} L${p(half, inset * 0.7)}`,
      `C${p(half + 0.7, rise - 0.1)} ${p(outer - 0.6, rise)} ${p(outer - 0.25, 0.2 + inset)}`,
      `C${p(outer + 0.1, 0.9 + inset)} ${p(outer + 0.2, floor * 0.7)} ${scale.x(outer - 0.5)} ${end}`,
      waved(scale.x(outer - 0.5), scale.x(-outer + 0.5), end),
    ].join(" ");
  };
  const wide = half + 0.5;
  const pulp = [
    `M${scale.x(-wide)} ${end}`,
    `C${scale.x(-wide)} ${pulpTop + 4} ${scale.x(-half * 0.6)} ${pulpTop} ${scale.x(0)} ${pulpTop}`,
    `C${scale.x(half * 0.6)} ${pulpTop} ${scale.x(wide)} ${pulpTop + 4} ${scale.x(wide)} ${end}`,
  ].join(" ");
  return (
    <g aria-hidden="true">
      <path class="enamel" d={shell(0, -0.75)} />
      <path class="dentine" d={shell(0.8, 0.6)} />
      {end - pulpTop > 6 && <path class={known ? "pulp" : "pulp unknown"} d={pulp} />}
      {end - pulpTop > 22 && (
        <text class="pulp-word" x={scale.x(0)} y={Math.min(end - 9, pulpTop + 22)} text-anchor="middle">
          {known ? words.section.pulp : words.section.pulpUnknown}
        </text>
      )}
      {known && scale.dentineMm * scale.perMm > 20 && (
        <text class="dentine-word" x={scale.x(0)} y={(scale.y(floor) + pulpTop) / 2 + 5} text-anchor="middle">
          {words.section.dentine(shownMm(scale.dentineMm))}
        </text>
      )}
      <path class="box" d={`M${p(-half, 0)} L${p(-half, floor)} L${p(half, floor)} L${p(half, 0)}`} />
    </g>
  );
}

/** A break line from right to left, as drawings show that a part goes on. */
function waved(from: number, to: number, y: number): string {
  const waves = 6;
  const step = (to - from) / waves;
  return (
    Array.from({ length: waves }, (_, index) => `q${step / 2} ${index % 2 === 0 ? -5 : 5} ${step} 0`).join(" ") +
    ` M${to} ${y}`
  );
}
