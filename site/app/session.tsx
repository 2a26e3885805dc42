/** The running page: its state, the engine it asks, and what it keeps on the device. */
import { useEffect, useReducer, useRef, useState } from "preact/hooks";
import { startEngine, type Engine } from "./engine";
import { forget, keep, lastKept } from "./keep";
import { fileName, saveText, textsOf } from "./open";
import { cardsOf, clinicOf, firstState, next, type State } from "./state";
import { problemsOf, type Answer, type Plan, type OpenAnswer, type Start } from "./types";
import { keepOffline, offerUpdate, readyOffline } from "./updates";
import { App } from "./views/app";
import { words } from "./words/index";

const SETTLE_MS = 60;
const STEPS = { python: 0.4, engine: 0.8, ready: 1 } as const;

export function Session() {
  const [state, send] = useReducer(next, null, () => firstState(lastKept()));
  const [update, setUpdate] = useState<(() => void) | null>(null);
  const [offline, setOffline] = useState(false);
  const engine = useRef<Engine | null>(null);

  useEffect(() => {
    const started = startEngine({
      step: (step) => send({ is: "progress", share: STEPS[step] }),
      slow: () => send({ is: "slow" }),
      trouble: ({ trouble, detail }) => send({ is: "trouble", says: `${words.trouble[trouble]} (${detail})` }),
    });
    engine.current = started;
    started.call<Start>({ do: "start" }).then(
      (start) => {
        send({ is: "started", start });
        void keepOffline();
        void readyOffline().then(setOffline);
        void offerUpdate((take) => setUpdate(() => take));
      },
      () => undefined,
    ); // the listener has been told why
    return () => started.stop();
  }, []);

  useEffect(() => {
    if (state.start === null || engine.current === null) return undefined;
    const { plan } = state;
    const asked = engine.current;
    const timer = setTimeout(() => {
      asked.latest<Answer>(question(state)).then(
        (answer) => {
          if (answer !== undefined) send({ is: "answered", plan, answer });
        },
        () => undefined,
      );
    }, SETTLE_MS);
    return () => clearTimeout(timer);
  }, [state.plan, state.cards, state.clinic, state.start]);

  useEffect(() => {
    if (state.touched) keep({ plan: state.plan, from: state.from, cards: state.cards, clinic: state.clinic });
  }, [state.plan, state.cards, state.clinic, state.touched]);

  const open = async (files: readonly File[]) => {
    const asked = engine.current;
    if (asked === null || files.length === 0) return;
    const { texts, problems } = await textsOf(files);
    if (problems.length > 0) return send({ is: "unopened", problems });
    const held = { cards: cardsOf(state), clinic: clinicOf(state) };
    const answer = await asked.call<OpenAnswer>({ do: "open", files: texts, ...held });
    if (!answer.ok) return send({ is: "unopened", problems: problemsOf(answer) });
    const { plan, cards, clinic } = answer;
    return send({ is: "opened", plan, cards, clinic, names: files.map((file) => file.name) });
  };

  const save = async () => {
    const answer = await engine.current?.call<{ ok: boolean; text?: string }>({ do: "write", data: state.plan });
    if (answer?.text !== undefined) saveText(fileName(state.plan.title), answer.text);
  };

  return (
    <App
      state={state}
      send={send}
      update={update}
      offline={offline}
      onOpen={(files) => void open(files)}
      onSave={() => void save()}
      onForget={startAfresh}
    />
  );
}

/** Forgets the last plan and the opened cards, and begins as on a first visit. */
function startAfresh(): void {
  forget();
  location.reload();
}

function question(state: State): { do: "check"; plan: Plan; cards: unknown; clinic: unknown; on: string | null } {
  const on = state.plan["on"] === undefined ? today() : null;
  return { do: "check", plan: state.plan, cards: cardsOf(state), clinic: clinicOf(state), on };
}

/** Today where the person is, since the engine's own clock runs on another time. */
function today(): string {
  const now = new Date();
  const two = (value: number) => String(value).padStart(2, "0");
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`;
}
