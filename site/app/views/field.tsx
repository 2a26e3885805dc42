/** One field of the plan, drawn as its kind asks, reading and changing its own place. */
import type { Field } from "../fields";
import { at } from "../paths";
import { effective } from "../plan";
import { choicesAt, defaultAt, rangeAt } from "../schema";
import { clinicOf, problemAt, type Action, type State } from "../state";
import type { Json, Path } from "../types";
import { optionWord, words, type FieldName } from "../words/index";
import { Choice, Line, Many, type Option } from "./choice";
import { Stepper } from "./stepper";

export interface Part {
  readonly state: State;
  readonly send: (action: Action) => void;
}

interface FieldProps extends Part {
  readonly under: Path;
  readonly field: Field;
  readonly label?: string;
}

export function FieldView({ state, send, under, field, label = words.fields[field.name] }: FieldProps) {
  const path = [...under, field.name];
  const id = path.join("-");
  const assumed = defaultAt(path);
  const value = effective(state.plan, clinicOf(state), path) ?? assumed;
  const usual = at(clinicOf(state)?.usual, path);
  const problem = problemAt(state, path);
  const set = (next: number | string | boolean | readonly string[] | undefined) =>
    send({ is: "edit", path, value: next });
  switch (field.kind) {
    case "number":
      return (
        <Stepper
          key={id}
          id={id}
          label={label}
          value={typeof value === "number" ? value : undefined}
          range={rangeAt(path)}
          step={field.step}
          start={field.start}
          optional={field.optional}
          problem={problem}
          onValue={set}
        />
      );
    case "choice": {
      const options = (field.options ?? choicesAt(path)).map((word) => ({
        value: word,
        label: optionWord(field.name, word),
      }));
      const open = field.optional && assumed === undefined && !options.some((option) => option.value === "unanswered");
      const answers = open ? [empty(usual, field.name), ...options] : options;
      const shown = open ? at(state.plan, path) : value;
      return (
        <Choice
          id={id}
          label={label}
          value={typeof shown === "string" ? shown : ""}
          options={answers}
          problem={problem}
          onValue={(word) => set(word || undefined)}
        />
      );
    }
    case "answer": {
      const options = [
        empty(usual, field.name),
        { value: "yes", label: words.options.yes },
        { value: "no", label: words.options.no },
      ];
      const own = at(state.plan, path);
      const answer = own === true ? "yes" : own === false ? "no" : "";
      return (
        <Choice
          id={id}
          label={label}
          value={answer}
          options={options}
          problem={problem}
          onValue={(word) => set(word === "" ? undefined : word === "yes")}
        />
      );
    }
    case "many": {
      const options = choicesAt([...path, 0]).map((word) => ({ value: word, label: optionWord(field.name, word) }));
      return (
        <Many
          id={id}
          label={label}
          values={Array.isArray(value) ? (value as readonly string[]) : []}
          options={options}
          onValues={set}
        />
      );
    }
    case "text":
    case "date":
      return (
        <Line
          id={id}
          label={label}
          type={field.kind}
          value={typeof value === "string" ? value : ""}
          problem={problem}
          onValue={(text) => set(text || undefined)}
        />
      );
  }
}

/** The choice that writes nothing down: the clinic's usual value then counts, if there is one. */
function empty(usual: Json | undefined, name: FieldName): Option {
  if (usual === undefined) return { value: "", label: words.options.unanswered };
  const word =
    typeof usual === "boolean" ? (usual ? words.options.yes : words.options.no) : optionWord(name, String(usual));
  return { value: "", label: words.usual(word) };
}
