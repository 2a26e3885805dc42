/** The plan's title, the cavity, the tip's gap and what stands around them. */
import { CAVITY } from "../fields";
import { problemAt } from "../state";
import { words } from "../words/index";
import { Line } from "./choice";
import { Exposures } from "./exposures";
import { FieldView, type Part } from "./field";

export function CavityPanel({ state, send }: Part) {
  return (
    <>
      <Line
        id="title"
        label={words.plan.title}
        value={state.plan.title}
        hint={words.plan.noPatient}
        problem={problemAt(state, ["title"])}
        onValue={(title) => send({ is: "edit", path: ["title"], value: title })}
      />
      <div class="fields">
        {CAVITY.map(({ path, field }) => (
          <FieldView key={field.name} state={state} send={send} under={path} field={field} />
        ))}
      </div>
      <details>
        <summary>{words.adhesive.after}</summary>
        <Exposures state={state} send={send} path={["after"]} />
      </details>
    </>
  );
}
