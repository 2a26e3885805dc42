/** The increments in the box: light by depth as one ink, hatched where it falls short, touched to be chosen. */
import type { DrawnIncrement, Drawing } from "../types";
import { words } from "../words/index";
import { inkOf, type Scale } from "./section-scale";

/** From what height on an increment has room for its number in a ring, and for the number alone. */
const [BALLOON, LETTER] = [24, 13];

interface IncrementsProps {
  readonly drawing: Drawing;
  readonly scale: Scale;
  readonly selected: number;
  readonly onSelect: (index: number) => void;
}

export function Increments({ drawing, scale, selected, onSelect }: IncrementsProps) {
  const chosen = drawing.increments[selected];
  return (
    <g>
      {drawing.increments.map((increment, index) => (
        <One
          key={increment.number}
          increment={increment}
          scale={scale}
          width={drawing.cavity.width_mm}
          chosen={index === selected}
          onSelect={() => onSelect(index)}
        />
      ))}
      {chosen !== undefined && <rect class="chosen-edge" {...boxOf(chosen, scale, drawing.cavity.width_mm)} />}
    </g>
  );
}

function boxOf({ top_mm: top, bottom_mm: bottom }: DrawnIncrement, scale: Scale, width: number) {
  return { x: scale.x(-width / 2), y: scale.y(top), width: width * scale.perMm, height: (bottom - top) * scale.perMm };
}

interface OneProps {
  readonly increment: DrawnIncrement;
  readonly scale: Scale;
  readonly width: number;
  readonly chosen: boolean;
  readonly onSelect: () => void;
}

function One({ increment, scale, width, chosen, onSelect }: OneProps) {
  const { number, top_mm: top, bottom_mm: bottom, short_from_mm: short, finding } = increment;
  const box = boxOf(increment, scale, width);
  const mark = words.marks[finding];
  const label =
    increment.far_shown === null
      ? words.section.pickUnknown(number, mark)
      : words.section.pick(number, increment.far_shown, mark);
  const middle = box.y + box.height / 2;
  return (
    <g
      class="increment"
      role="button"
      tabindex={0}
      aria-pressed={chosen}
      aria-label={label}
      data-number={number}
      onClick={onSelect}
      onKeyDown={(event) => {
        if (event.key !== "Enter" && event.key !== " ") return;
        event.preventDefault();
        onSelect();
      }}
    >
      <Ink increment={increment} />
      <rect class="increment-ground" {...box} />
      <rect {...box} fill={`url(#ink-${number})`} />
      {short !== null && (
        <rect
          x={box.x}
          y={scale.y(top + short)}
          width={box.width}
          height={Math.max(0, scale.y(bottom) - scale.y(top + short))}
          fill="url(#hatch)"
        />
      )}
      <rect class="increment-edge" {...box} />
      {box.height >= BALLOON && <circle class="balloon" cx={box.x + 16} cy={middle} r={11} />}
      {box.height >= LETTER && (
        <text class="balloon-word" x={box.x + 16} y={middle + 5} text-anchor="middle">
          {number}
        </text>
      )}
    </g>
  );
}

/** The ramp of one increment: a stop for each depth the engine gave. */
function Ink({ increment }: { readonly increment: DrawnIncrement }) {
  const thickness = increment.bottom_mm - increment.top_mm;
  return (
    <linearGradient id={`ink-${increment.number}`} x1="0" y1="0" x2="0" y2="1">
      {increment.profile.map(([depth, share], index) => (
        <stop key={index} class="ink" offset={Math.min(1, depth / thickness)} stop-opacity={inkOf(share)} />
      ))}
    </linearGradient>
  );
}
