/** The light in the room while placing, and the eyes of the people in it. */
import { SOURCE, TEAM } from "../fields";
import { listAt } from "../plan";
import { choicesAt } from "../schema";
import { clinicOf } from "../state";
import type { Data } from "../types";
import { words } from "../words/index";
import { FieldView, type Part } from "./field";

const SOURCES = ["room", "sources"] as const;

export function RoomPanel({ state, send }: Part) {
  const sources = listAt(state.plan, clinicOf(state), SOURCES);
  const put = (next: readonly Data[]) => send({ is: "edit", path: SOURCES, value: next });
  const first = choicesAt([...SOURCES, 0, "what"])[0] ?? "operating-light-led";
  return (
    <>
      <section aria-label={words.room.sources}>
        <h3>{words.room.sources}</h3>
        {sources.map((_, index) => (
          <div key={index} class="fields">
            {SOURCE.map((field) => (
              <FieldView key={field.name} state={state} send={send} under={[...SOURCES, index]} field={field} />
            ))}
            <button type="button" class="quiet low" onClick={() => put(sources.filter((__, each) => each !== index))}>
              {words.room.remove(index + 1)}
            </button>
          </div>
        ))}
        <button type="button" onClick={() => put([...sources, { what: first, illuminance_lx: 8000, filter: "none" }])}>
          {words.room.add}
        </button>
      </section>
      <section aria-label={words.room.team}>
        <h3>{words.room.team}</h3>
        <p class="hint">{words.room.yesNoOnly}</p>
        <div class="fields">
          {TEAM.map((field) => (
            <FieldView key={field.name} state={state} send={send} under={["team"]} field={field} />
          ))}
        </div>
      </section>
    </>
  );
}
