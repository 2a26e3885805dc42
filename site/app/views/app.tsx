/** The whole page: what is known at one moment, laid out. */
import type { State, Action } from "../state";
import { working } from "../state";
import { words } from "../words/index";
import { Clock } from "./clock";
import { Files } from "./files";
import { Findings } from "./findings";
import { Header } from "./header";
import { Panels } from "./panels";
import { Section } from "./section";
import { Tools } from "./tools";

export interface AppProps {
  readonly state: State;
  readonly send: (action: Action) => void;
  readonly onOpen: (files: readonly File[]) => void;
  readonly onSave: () => void;
  readonly onForget: () => void;
  readonly update: (() => void) | null;
  readonly offline: boolean;
}

export function App({ state, send, onOpen, onSave, onForget, update, offline }: AppProps) {
  const stale = state.answered !== null && state.answered.plan !== state.plan;
  const shown = stale && !working(state);
  return (
    <>
      <Header state={state} />
      {state.trouble !== null && (
        <p class="trouble" role="alert">
          {state.trouble}
        </p>
      )}
      {update !== null && (
        <p class="update" role="status">
          {words.update.ready}{" "}
          <button type="button" onClick={update}>
            {words.update.take}
          </button>
        </p>
      )}
      <main class="work" id="work">
        <div class="seen">
          <Section state={state} send={send} stale={shown} />
          <Clock drawing={state.answered?.drawing} stale={shown} />
        </div>
        <div class="set">
          <Tools state={state} send={send} offline={offline} />
          <Panels state={state} send={send} />
          <Findings state={state} stale={shown} />
        </div>
      </main>
      <footer class="foot">
        <p>
          {state.answered?.report.caution ?? state.start?.caution ?? words.caution}{" "}
          <a href="cautions/">{words.cautionMore}</a>
        </p>
      </footer>
      <Files state={state} send={send} onOpen={onOpen} onSave={onSave} onForget={onForget} offline={offline} />
    </>
  );
}
