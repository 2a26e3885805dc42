/** The adhesive and the liner: which, whether thinned, and the exposures of their own. */
import { at } from "../paths";
import { effective } from "../plan";
import { cardsOf, clinicOf, problemAt } from "../state";
import { words } from "../words/index";
import { Choice } from "./choice";
import { Exposures } from "./exposures";
import { FieldView, type Part } from "./field";

const NOT_USED = "not-used";

export function AdhesivePanel({ state, send }: Part) {
  return (
    <>
      <Layer state={state} send={send} layer="adhesive" />
      <Layer state={state} send={send} layer="liner" />
    </>
  );
}

function Layer({ state, send, layer }: Part & { readonly layer: "adhesive" | "liner" }) {
  const value = effective(state.plan, clinicOf(state), [layer]);
  const card = at(value, ["card"]);
  const used = value !== undefined && value !== NOT_USED;
  const chosen = typeof card === "string" ? card : value === NOT_USED ? NOT_USED : "";
  const options = [
    ...(at(clinicOf(state)?.usual, [layer]) === undefined ? [{ value: "", label: words.adhesive.unanswered }] : []),
    { value: NOT_USED, label: words.adhesive.notUsed },
    ...cardsOf(state)
      .filter((each) => each.kind === layer)
      .map((each) => ({ value: each.id, label: each.title })),
  ];
  const choose = (id: string) => {
    const kept = used && typeof value === "object" ? value : { exposures: [{ time_s: 20 }] };
    send({
      is: "edit",
      path: [layer],
      value: id === "" ? undefined : id === NOT_USED ? NOT_USED : { ...kept, card: id },
    });
  };
  return (
    <section class="layer" aria-label={words.adhesive[layer]}>
      <div class="fields">
        <Choice
          id={`${layer}-card`}
          label={words.adhesive[layer]}
          value={chosen}
          options={options}
          problem={problemAt(state, [layer]) ?? problemAt(state, [layer, "card"])}
          onValue={choose}
        />
        {used && layer === "adhesive" && (
          <FieldView
            state={state}
            send={send}
            under={[layer]}
            field={{ name: "thinned", kind: "answer", step: 1, start: 0, optional: true }}
          />
        )}
      </div>
      {used && (
        <details open={layer === "adhesive"}>
          <summary>
            {words.adhesive[layer]}: {words.adhesive.exposed}
          </summary>
          <Exposures state={state} send={send} path={[layer, "exposures"]} />
        </details>
      )}
    </section>
  );
}
