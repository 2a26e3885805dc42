/** The increment at hand: which one, its place in the order, and what is set for it. */
import { EXPOSURE_FIRST, INCREMENT_FIRST, INCREMENT_MORE } from "../fields";
import { MOST_INCREMENTS } from "../plan";
import { at } from "../paths";
import { cardsOf, clinicOf, problemAt, working } from "../state";
import { words } from "../words/index";
import { Choice } from "./choice";
import { Exposures } from "./exposures";
import { FieldView, type Part } from "./field";
import { MarkShape } from "./mark";
import { SignButton } from "./sign-button";

export function IncrementPanel({ state, send }: Part) {
  const { selected, plan } = state;
  const path = ["increments", selected];
  const exposed = at(plan, [...path, "exposures", 0]) !== undefined;
  return (
    <>
      <Order state={state} send={send} />
      <div class="fields first">
        <CompositeChoice state={state} send={send} />
        {INCREMENT_FIRST.map((field) => (
          <FieldView key={field.name} state={state} send={send} under={path} field={field} />
        ))}
        {exposed &&
          EXPOSURE_FIRST.map((field) => (
            <FieldView key={field.name} state={state} send={send} under={[...path, "exposures", 0]} field={field} />
          ))}
      </div>
      <details>
        <summary>{words.increment.more}</summary>
        <div class="fields">
          {INCREMENT_MORE.map((field) => (
            <FieldView key={field.name} state={state} send={send} under={path} field={field} />
          ))}
        </div>
        <Exposures state={state} send={send} path={[...path, "exposures"]} firstShown />
      </details>
    </>
  );
}

/** The increments as buttons from the floor up, and what can be done with the one in hand. */
function Order({ state, send }: Part) {
  const { plan, selected } = state;
  const count = plan.increments.length;
  const drawn = state.answered?.drawing.increments;
  return (
    <div class="order">
      <div class="picks" role="group" aria-label={words.increment.list}>
        {plan.increments.map((_, index) => {
          const mark = working(state) ? undefined : drawn?.[index]?.finding;
          return (
            <button
              key={index}
              type="button"
              class="pick"
              aria-pressed={index === selected}
              aria-label={words.increment.pick(index + 1)}
              onClick={() => send({ is: "select", index })}
            >
              {index + 1} {mark !== undefined && <MarkShape mark={mark} />}
            </button>
          );
        })}
      </div>
      <div class="moves" role="group" aria-label={words.increment.title(selected + 1, count)}>
        <SignButton
          name={words.increment.down}
          sign="down"
          disabled={selected === 0}
          onClick={() => send({ is: "move", by: -1 })}
        />
        <SignButton
          name={words.increment.up}
          sign="up"
          disabled={selected === count - 1}
          onClick={() => send({ is: "move", by: 1 })}
        />
        <button type="button" disabled={count >= MOST_INCREMENTS} onClick={() => send({ is: "add", copy: false })}>
          {words.increment.add}
        </button>
        <button type="button" disabled={count >= MOST_INCREMENTS} onClick={() => send({ is: "add", copy: true })}>
          {words.increment.copy}
        </button>
        <button type="button" disabled={count === 1} onClick={() => send({ is: "remove" })}>
          {words.increment.remove}
        </button>
      </div>
    </div>
  );
}

function CompositeChoice({ state, send }: Part) {
  const path = ["increments", state.selected, "composite"];
  const composites = cardsOf(state).filter((card) => card.kind === "composite");
  const usual = at(clinicOf(state)?.usual, ["composite"]);
  const own = at(state.plan, path);
  const usualTitle = composites.find((card) => card.id === usual)?.title;
  const options = [
    ...(usualTitle === undefined ? [] : [{ value: "", label: words.usual(usualTitle) }]),
    ...composites.map((card) => ({ value: card.id, label: card.title })),
  ];
  return (
    <Choice
      id={path.join("-")}
      label={words.increment.composite}
      value={typeof own === "string" ? own : ""}
      options={options}
      problem={problemAt(state, path)}
      onValue={(id) => send({ is: "edit", path, value: id || undefined })}
    />
  );
}
