/** The section to scale: tooth, box, increments with their light by depth, the tip, and the share of need at each far side. */
import { at } from "../paths";
import { shownMm } from "../numbers";
import { effective } from "../plan";
import { clinicOf } from "../state";
import type { Drawing } from "../types";
import { words } from "../words/index";
import type { Part } from "./field";
import { Increments } from "./section-increments";
import { Plot } from "./section-plot";
import { sectionScale, type Scale } from "./section-scale";
import { SectionTable } from "./section-table";
import { Tip } from "./section-tip";
import { Tooth } from "./section-tooth";
import { useSize, type Size } from "./size";

export function Section({ state, send, stale }: Part & { readonly stale: boolean }) {
  const [box, size] = useSize<HTMLDivElement>();
  const drawing = state.answered?.drawing;
  return (
    <section class={stale ? "section stale" : "section"} aria-label={words.section.title}>
      <h2>
        {words.section.title} <span class="unit">{words.section.unit}</span>
      </h2>
      <div class="drawing" ref={box}>
        {drawing === undefined || size.width === 0 ? (
          <p class="hint">{words.section.waiting}</p>
        ) : (
          <Drawn drawing={drawing} scale={sectionScale(drawing, size)} size={size} state={state} send={send} />
        )}
      </div>
      {drawing !== undefined && <SectionTable drawing={drawing} />}
    </section>
  );
}

interface DrawnProps extends Part {
  readonly drawing: Drawing;
  readonly scale: Scale;
  readonly size: Size;
}

function Drawn({ drawing, scale, size: { width, height, unit }, state, send }: DrawnProps) {
  const exposure = effective(state.plan, clinicOf(state), ["increments", state.selected, "exposures", 0]);
  const number = (key: string) => {
    const value = at(exposure, [key]);
    return typeof value === "number" ? value : 0;
  };
  return (
    <svg
      width={width * unit}
      height={height * unit}
      viewBox={`0 0 ${width} ${height}`}
      role="group"
      aria-label={words.section.describe}
    >
      <Patterns scale={scale} />
      <rect
        class="grid"
        x={scale.gutter}
        y="0"
        width={scale.toothRight - scale.gutter}
        height={scale.bottom}
        fill="url(#grid)"
      />
      <Tooth drawing={drawing} scale={scale} />
      <Tip
        drawing={drawing}
        scale={scale}
        tilt={number("tilt_deg")}
        offset={number("aim_offset_mm")}
        side={at(exposure, ["from"]) === "side"}
      />
      <Chain drawing={drawing} scale={scale} />
      <Plot drawing={drawing} scale={scale} selected={state.selected} />
      <Increments
        drawing={drawing}
        scale={scale}
        selected={state.selected}
        onSelect={(index) => send({ is: "select", index })}
      />
    </svg>
  );
}

function Patterns({ scale }: { readonly scale: Scale }) {
  const step = scale.perMm;
  return (
    <defs>
      <pattern id="grid" x={scale.x(0)} y={scale.y(0)} width={step} height={step} patternUnits="userSpaceOnUse">
        <path class="grid-line" d={`M${step} 0H0V${step}`} />
      </pattern>
      <pattern id="hatch" width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
        <rect class="hatch" width="1.7" height="6" />
      </pattern>
    </defs>
  );
}

/** The chain of measures at the left: gap, each increment, dentine left. */
function Chain({ drawing, scale }: { readonly drawing: Drawing; readonly scale: Scale }) {
  const { cavity, tip, increments } = drawing;
  const spans: (readonly [number, number])[] = [
    [-tip.gap_mm, Math.min(0, increments.at(-1)?.top_mm ?? 0)],
    ...increments.map((each) => [each.top_mm, each.bottom_mm] as const),
    ...(cavity.remaining_dentine_mm === null
      ? []
      : [[cavity.depth_mm, cavity.depth_mm + cavity.remaining_dentine_mm] as const]),
  ];
  const x = scale.gutter - 6;
  return (
    <g class="chain" aria-hidden="true">
      {spans
        .filter(([from, to]) => to - from > 1e-6)
        .map(([from, to], index) => {
          const [top, bottom] = [scale.y(from), scale.y(to)];
          return (
            <g key={index}>
              <path d={`M${x} ${top}V${bottom}M${x - 5} ${top}h10M${x - 5} ${bottom}h10`} />
              {bottom - top > 11 && (
                <text x={x - 8} y={(top + bottom) / 2 + 4.5} text-anchor="end">
                  {shownMm(to - from)}
                </text>
              )}
            </g>
          );
        })}
    </g>
  );
}
