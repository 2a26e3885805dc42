/** A choice from a few words, a yes or no, several at once, a line of text, a day. */
import type { ComponentChildren } from "preact";
import { words } from "../words/index";

const MOST_LETTERS = 120;

export interface Option {
  readonly value: string;
  readonly label: string;
}

interface ChoiceProps {
  readonly id: string;
  readonly label: string;
  readonly value: string;
  readonly options: readonly Option[];
  readonly problem?: string | null;
  readonly onValue: (value: string) => void;
}

export function Choice({ id, label, value, options, problem = null, onValue }: ChoiceProps) {
  const known = options.some((option) => option.value === value);
  return (
    <div class="field">
      <label for={id}>{label}</label>
      <select
        id={id}
        class={problem === null ? undefined : "faulty"}
        value={value}
        aria-invalid={problem !== null}
        aria-describedby={problem === null ? undefined : `${id}-says`}
        onChange={(event) => onValue(event.currentTarget.value)}
      >
        {!known && <option value={value}>{value === "" ? words.choose : value}</option>}
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
      <Fault id={id} says={problem} />
    </div>
  );
}

interface ManyProps {
  readonly id: string;
  readonly label: string;
  readonly values: readonly string[];
  readonly options: readonly Option[];
  readonly onValues: (values: readonly string[]) => void;
}

export function Many({ id, label, values, options, onValues }: ManyProps) {
  return (
    <fieldset class="field many" id={id}>
      <legend>{label}</legend>
      {options.map(({ value, label: word }) => (
        <label key={value} class="tick">
          <input
            type="checkbox"
            checked={values.includes(value)}
            onChange={(event) =>
              onValues(
                options
                  .map((option) => option.value)
                  .filter((each) => (each === value ? event.currentTarget.checked : values.includes(each))),
              )
            }
          />
          {word}
        </label>
      ))}
    </fieldset>
  );
}

interface LineProps {
  readonly id: string;
  readonly label: string;
  readonly type?: "text" | "date";
  readonly value: string;
  readonly hint?: ComponentChildren;
  readonly problem?: string | null;
  readonly onValue: (value: string) => void;
}

export function Line({ id, label, type = "text", value, hint, problem = null, onValue }: LineProps) {
  const described = [hint === undefined ? "" : `${id}-hint`, problem === null ? "" : `${id}-says`].join(" ").trim();
  const shared = {
    id,
    value,
    autocomplete: "off",
    class: problem === null ? undefined : "faulty",
    "aria-invalid": problem !== null,
    "aria-describedby": described || undefined,
    onInput: (event: InputEvent & { readonly currentTarget: HTMLInputElement }) => onValue(event.currentTarget.value),
  };
  return (
    <div class="field">
      <label for={id}>{label}</label>
      {type === "date" ? <input type="date" {...shared} /> : <input type="text" maxLength={MOST_LETTERS} {...shared} />}
      {hint !== undefined && (
        <p class="hint" id={`${id}-hint`}>
          {hint}
        </p>
      )}
      <Fault id={id} says={problem} />
    </div>
  );
}

function Fault({ id, says }: { readonly id: string; readonly says: string | null }) {
  return says === null ? null : (
    <p class="fault" id={`${id}-says`} role="alert">
      {says}
    </p>
  );
}
