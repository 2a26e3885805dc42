/** The groups of fields behind tabs: one at a time, so that the findings stay in sight. */
import { useRef } from "preact/hooks";
import type { Panel } from "../state";
import { words } from "../words/index";
import type { Part } from "./field";
import { AdhesivePanel } from "./panel-adhesive";
import { CavityPanel } from "./panel-cavity";
import { IncrementPanel } from "./panel-increment";
import { LampPanel } from "./panel-lamp";
import { RoomPanel } from "./panel-room";

const VIEWS: Record<Panel, (part: Part) => preact.JSX.Element> = {
  increment: IncrementPanel,
  cavity: CavityPanel,
  lamp: LampPanel,
  adhesive: AdhesivePanel,
  room: RoomPanel,
};
const ORDER = Object.keys(VIEWS) as Panel[];

export function Panels({ state, send }: Part) {
  const list = useRef<HTMLDivElement>(null);
  const View = VIEWS[state.panel];
  const move = (event: KeyboardEvent) => {
    const by = event.key === "ArrowRight" ? 1 : event.key === "ArrowLeft" ? -1 : 0;
    if (by === 0) return;
    event.preventDefault();
    const index = (ORDER.indexOf(state.panel) + by + ORDER.length) % ORDER.length;
    send({ is: "panel", panel: ORDER[index] ?? "increment" });
    list.current?.querySelectorAll("button")[index]?.focus();
  };
  return (
    <section class="panels" aria-label={words.panels.label}>
      <div class="tabs" role="tablist" aria-label={words.panels.label} ref={list} onKeyDown={move}>
        {ORDER.map((panel) => (
          <button
            key={panel}
            type="button"
            role="tab"
            id={`tab-${panel}`}
            aria-controls="panel"
            aria-selected={panel === state.panel}
            tabIndex={panel === state.panel ? 0 : -1}
            onClick={() => send({ is: "panel", panel })}
          >
            {words.panels[panel]}
          </button>
        ))}
      </div>
      <div class="panel" role="tabpanel" id="panel" aria-labelledby={`tab-${state.panel}`}>
        <View state={state} send={send} />
      </div>
    </section>
  );
}
