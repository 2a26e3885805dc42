/** The chair clock: light, placing and rests along time, with the window this room leaves for each placing. */
import { shownNumber } from "../numbers";
import type { ClockStep, Drawing } from "../types";
import { words } from "../words/index";
import { ClockTable } from "./clock-table";
import { useSize } from "./size";

const [LABELS, TOP, HIGH] = [12, 20, 28];

export function Clock({ drawing, stale }: { readonly drawing: Drawing | undefined; readonly stale: boolean }) {
  const [box, { width, unit }] = useSize<HTMLDivElement>();
  return (
    <section class={stale ? "clock stale" : "clock"} aria-label={words.clock.title}>
      <h2>
        {words.clock.title} {drawing !== undefined && <span class="unit">{total(drawing.clock_s)}</span>}
      </h2>
      <div class="drawing" ref={box}>
        {drawing !== undefined && width > 0 && <Line drawing={drawing} width={width} unit={unit} />}
      </div>
      {drawing !== undefined && <p class="under">{windowSays(drawing)}</p>}
      {drawing !== undefined && <ClockTable drawing={drawing} />}
    </section>
  );
}

function Line({ drawing, width, unit }: { readonly drawing: Drawing; readonly width: number; readonly unit: number }) {
  const span = Math.max(drawing.clock_s, 1);
  const x = (seconds: number) => 1 + (seconds / span) * (width - 2);
  const every = [10, 20, 30, 60, 120, 300, 600].find((step) => (step / span) * width > 44) ?? 1200;
  const ticks = Array.from({ length: Math.floor(span / every) + 1 }, (_, index) => index * every);
  const base = TOP + HIGH;
  return (
    <svg
      width={width * unit}
      height={(base + 50) * unit}
      viewBox={`0 0 ${width} ${base + 50}`}
      role="img"
      aria-label={words.clock.describe}
    >
      {layersOf(drawing.clock).map(({ label, start, end }) => (
        <g key={start}>
          <path class="bracket" d={`M${x(start) + 1} ${TOP - 3}v-3H${x(end) - 1}v3`} />
          {x(end) - x(start) > label.length * 8 && (
            <text x={(x(start) + x(end)) / 2} y={LABELS - 2} text-anchor="middle">
              {label}
            </text>
          )}
        </g>
      ))}
      {drawing.clock.map((step) => (
        <Step
          key={`${step.start_s}-${step.what}`}
          step={step}
          from={x(step.start_s)}
          to={x(step.start_s + step.length_s)}
        />
      ))}
      {drawing.window_s.map(({ number, window_s: window, placing_s: placing }) => {
        const place = drawing.clock.find(
          (step) => step.what === "place" && step.layer === "increment" && step.number === number,
        );
        if (place === undefined || window === null) return null;
        const [from, to] = [x(place.start_s), Math.min(width - 1, x(place.start_s + window))];
        const y = base + (number % 2 === 1 ? 6 : 13);
        const over = placing !== null && placing > window;
        return (
          <path
            key={number}
            class={over ? "window over" : "window"}
            d={`M${from} ${y}H${to}M${from} ${y - 3}v6M${to} ${y - 3}v6`}
          />
        );
      })}
      <path class="time" d={`M1 ${base + 24}H${width - 1}`} />
      {ticks.map((tick) => (
        <g key={tick}>
          <path class="time" d={`M${x(tick)} ${base + 24}v5`} />
          <text x={x(tick)} y={base + 43} text-anchor={tick === 0 ? "start" : x(tick) > width - 16 ? "end" : "middle"}>
            {tick === 0 ? "0 s" : tick}
          </text>
        </g>
      ))}
    </svg>
  );
}

function Step({ step, from, to }: { readonly step: ClockStep; readonly from: number; readonly to: number }) {
  const label = step.what === "expose" ? shownNumber(step.length_s) : words.clock.does[step.what];
  return (
    <g class={`step ${step.what}`}>
      <rect x={from + 0.5} y={TOP} width={Math.max(1, to - from - 1)} height={HIGH} />
      {to - from > label.length * 8 + 4 && (
        <text x={(from + to) / 2} y={TOP + HIGH / 2 + 5} text-anchor="middle">
          {label}
        </text>
      )}
    </g>
  );
}

/** Runs of steps that belong to one layer or increment. */
function layersOf(clock: readonly ClockStep[]): readonly { label: string; start: number; end: number }[] {
  const runs: { label: string; start: number; end: number }[] = [];
  for (const step of clock) {
    const label = step.layer === "increment" ? String(step.number ?? "") : words.clock.layers[step.layer];
    const last = runs.at(-1);
    if (last?.label === label) last.end = step.start_s + step.length_s;
    else runs.push({ label, start: step.start_s, end: step.start_s + step.length_s });
  }
  return runs;
}

function total(seconds: number): string {
  const whole = Math.round(seconds);
  return words.clock.total(Math.floor(whole / 60), whole % 60);
}

/** The narrowest window against the longest placing. */
function windowSays({ window_s: windows }: Drawing): string {
  const known = windows.map((each) => each.window_s).filter((window): window is number => window !== null);
  const placings = windows.map((each) => each.placing_s).filter((placing): placing is number => placing !== null);
  if (known.length === 0) return words.clock.noWindow;
  if (placings.length === 0) return words.clock.noPlacing;
  return words.clock.window(shownNumber(Math.floor(Math.min(...known))), shownNumber(Math.max(...placings)));
}
