/** The lamp, its mode and sleeve, and what its card says of it. */
import { at } from "../paths";
import { effective } from "../plan";
import { choicesAt } from "../schema";
import { cardsOf, clinicOf, problemAt } from "../state";
import type { Card, Data } from "../types";
import { optionWord, words } from "../words/index";
import { Choice } from "./choice";
import type { Part } from "./field";

export function LampPanel({ state, send }: Part) {
  const lamps = cardsOf(state).filter((card) => card.kind === "lamp");
  const value = (key: string) => {
    const found = effective(state.plan, clinicOf(state), ["lamp", key]);
    return typeof found === "string" ? found : "";
  };
  const lamp = lamps.find((card) => card.id === value("card"));
  const set = (key: string, word: string) => send({ is: "edit", path: ["lamp", key], value: word || undefined });
  const choose = (id: string) => {
    const modes = modesOf(lamps.find((card) => card.id === id));
    const mode = modes.includes(value("mode")) ? value("mode") : (modes[0] ?? "");
    send({ is: "edit", path: ["lamp"], value: { card: id, mode, sleeve: value("sleeve") || "fitted" } });
  };
  return (
    <>
      <div class="fields">
        <Choice
          id="lamp-card"
          label={words.lamp.card}
          value={value("card")}
          problem={problemAt(state, ["lamp", "card"])}
          options={lamps.map((card) => ({ value: card.id, label: card.title }))}
          onValue={choose}
        />
        <Choice
          id="lamp-mode"
          label={words.lamp.mode}
          value={value("mode")}
          problem={problemAt(state, ["lamp", "mode"])}
          options={modesOf(lamp).map((mode) => ({ value: mode, label: mode }))}
          onValue={(mode) => set("mode", mode)}
        />
        <Choice
          id="lamp-sleeve"
          label={words.lamp.sleeve}
          value={value("sleeve")}
          problem={problemAt(state, ["lamp", "sleeve"])}
          options={choicesAt(["lamp", "sleeve"]).map((word) => ({ value: word, label: optionWord("sleeve", word) }))}
          onValue={(sleeve) => set("sleeve", sleeve)}
        />
      </div>
      {lamp !== undefined && <Readings lamp={lamp} />}
    </>
  );
}

function modesOf(lamp: Card | undefined): readonly string[] {
  const modes = at(lamp, ["modes"]);
  return Array.isArray(modes) ? modes.map((mode: Data) => String(mode["id"])) : [];
}

function Readings({ lamp }: { readonly lamp: Card }) {
  const readings = at(lamp, ["readings"]);
  const rows = Array.isArray(readings) ? (readings as readonly Data[]) : [];
  return (
    <div class="card-facts">
      <p>{words.lamp.tip(String(lamp["tip_diameter_mm"]))}</p>
      {rows.length > 0 && <h3>{words.lamp.readings}</h3>}
      <ul>
        {rows.map((row, index) => (
          <li key={index}>
            {String(row["on"])}: {words.header.reading(String(row["radiant_exitance_mw_cm2"]))}, {String(row["mode"])}
          </li>
        ))}
      </ul>
    </div>
  );
}
