/** A number with large buttons either side: press, or type with a comma or a point. */
import { useState } from "preact/hooks";
import { numberFrom, shownNumber, stepped } from "../numbers";
import { inRange, type Range } from "../schema";
import { words } from "../words/index";

interface StepperProps {
  readonly id: string;
  readonly label: string;
  readonly value: number | undefined;
  readonly range: Range;
  readonly step: number;
  readonly start: number;
  readonly optional: boolean;
  /** What the engine says against this value. */
  readonly problem: string | null;
  readonly onValue: (value: number | undefined) => void;
}

export function Stepper({ id, label, value, range, step, start, optional, problem, onValue }: StepperProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const fault = typed === null ? null : faultIn(typed, range, optional);
  const said = fault ?? problem;
  const press = (direction: 1 | -1) => {
    setTyped(null);
    onValue(value === undefined ? start : clamped(stepped(value, step, direction), range, step));
  };
  const type = (text: string) => {
    setTyped(text);
    if (faultIn(text, range, optional) === null)
      onValue(text.trim() === "" ? undefined : (numberFrom(text) ?? undefined));
  };
  return (
    <div class="field">
      <label for={id}>{label}</label>
      <div class={said === null ? "stepper" : "stepper faulty"}>
        <button
          type="button"
          aria-label={words.stepper.less(label)}
          disabled={value !== undefined && value <= range.least}
          onClick={() => press(-1)}
        >
          −
        </button>
        <input
          id={id}
          type="text"
          inputMode="decimal"
          autocomplete="off"
          spellcheck={false}
          value={typed ?? (value === undefined ? "" : shownNumber(value))}
          placeholder="–"
          aria-invalid={said !== null}
          aria-describedby={said === null ? undefined : `${id}-says`}
          onInput={(event) => type(event.currentTarget.value)}
          onBlur={() => fault === null && setTyped(null)}
          onKeyDown={(event) => {
            if (event.key !== "ArrowUp" && event.key !== "ArrowDown") return;
            event.preventDefault();
            press(event.key === "ArrowUp" ? 1 : -1);
          }}
        />
        <button
          type="button"
          aria-label={words.stepper.more(label)}
          disabled={value !== undefined && value >= range.most}
          onClick={() => press(1)}
        >
          +
        </button>
      </div>
      {said !== null && (
        <p class="fault" id={`${id}-says`} role="alert">
          {said}
        </p>
      )}
    </div>
  );
}

/** What is wrong with the text as it stands, or null. */
function faultIn(text: string, range: Range, optional: boolean): string | null {
  if (text.trim() === "") return optional ? null : words.stepper.needed;
  const value = numberFrom(text);
  if (value === null) return words.stepper.notNumber;
  return inRange(value, range) ? null : outside(range);
}

function outside({ least, most, above }: Range): string {
  if (most === Infinity)
    return above ? words.stepper.aboveOnly(shownNumber(least)) : words.stepper.fromOnly(shownNumber(least));
  return words.stepper.outside(shownNumber(least), shownNumber(most));
}

/** The value kept inside the range; where the least itself is too small, one step's tenth above it. */
function clamped(value: number, range: Range, step: number): number {
  const least = range.above ? Number((range.least + step / 10).toFixed(6)) : range.least;
  return Math.min(range.most, Math.max(least, value));
}
