/** The exposures of an increment, an adhesive or a liner, or those once the matrix is off: added, changed, removed. */
import { EXPOSURE_FIRST, EXPOSURE_MORE, THROUGH } from "../fields";
import { listAt, MOST_EXPOSURES } from "../plan";
import { clinicOf } from "../state";
import type { Data, Path } from "../types";
import { words } from "../words/index";
import { FieldView, type Part } from "./field";

interface ExposuresProps extends Part {
  readonly path: Path;
  /** Whether the first exposure's seconds and tilt stand elsewhere already. */
  readonly firstShown?: boolean;
}

export function Exposures({ state, send, path, firstShown = false }: ExposuresProps) {
  const list = listAt(state.plan, clinicOf(state), path);
  const put = (next: readonly Data[]) => send({ is: "edit", path, value: next });
  const last = list.at(-1) ?? { time_s: 20 };
  return (
    <div class="exposures">
      {list.length === 0 && <p class="hint">{words.exposure.none}</p>}
      {list.map((exposure, index) => (
        <section key={index} class="exposure" aria-label={words.exposure.title(index + 1)}>
          <div class="exposure-head">
            <h3>{words.exposure.title(index + 1)}</h3>
            <button
              type="button"
              class="quiet"
              aria-label={words.exposure.remove(index + 1)}
              onClick={() => put(list.filter((__, each) => each !== index))}
            >
              {words.increment.remove}
            </button>
          </div>
          <div class="fields">
            {!(firstShown && index === 0) &&
              EXPOSURE_FIRST.map((field) => (
                <FieldView key={field.name} state={state} send={send} under={[...path, index]} field={field} />
              ))}
            {EXPOSURE_MORE.filter((field) => field.name !== "side" || exposure["from"] === "side").map((field) => (
              <FieldView key={field.name} state={state} send={send} under={[...path, index]} field={field} />
            ))}
          </div>
          <Through state={state} send={send} path={[...path, index, "through"]} />
        </section>
      ))}
      <button type="button" disabled={list.length >= MOST_EXPOSURES} onClick={() => put([...list, last])}>
        {words.exposure.add}
      </button>
    </div>
  );
}

function Through({ state, send, path }: ExposuresProps) {
  const layers = listAt(state.plan, clinicOf(state), path);
  const put = (next: readonly Data[]) => send({ is: "edit", path, value: next.length === 0 ? undefined : next });
  return (
    <div class="through">
      {layers.length > 0 && <h4>{words.exposure.through}</h4>}
      {layers.map((_, index) => (
        <div key={index} class="fields">
          {THROUGH.map((field) => (
            <FieldView key={field.name} state={state} send={send} under={[...path, index]} field={field} />
          ))}
          <button type="button" class="quiet" onClick={() => put(layers.filter((__, each) => each !== index))}>
            {words.exposure.removeThrough(index + 1)}
          </button>
        </div>
      ))}
      <button type="button" class="quiet" onClick={() => put([...layers, { what: "glass-ceramic", thickness_mm: 1 }])}>
        {layers.length === 0 ? words.exposure.through : words.exposure.addThrough}
      </button>
    </div>
  );
}
