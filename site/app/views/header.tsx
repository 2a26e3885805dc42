/** The head of the page: the plan's title, lamp and protocol, and the verdict, said politely when it changes. */
import { effective } from "../plan";
import { cardsOf, clinicOf, working, type State } from "../state";
import { words } from "../words/index";
import { MarkShape } from "./mark";

export function Header({ state }: { readonly state: State }) {
  const on = state.answered?.report.on;
  return (
    <header class="head">
      <div class="what">
        <div class="title">
          <h1>{state.plan.title || words.name}</h1>
          <p>
            {state.from}
            {on !== undefined && `, ${words.header.on(on)}`}
          </p>
        </div>
        <p class="facts">
          <LampFacts state={state} />
          <ProtocolFacts state={state} />
        </p>
      </div>
      <Verdict state={state} />
    </header>
  );
}

function LampFacts({ state }: { readonly state: State }) {
  const id = effective(state.plan, clinicOf(state), ["lamp", "card"]);
  const title = cardsOf(state).find((card) => card.kind === "lamp" && card.id === id)?.title;
  const judged = state.answered?.report.lamp;
  const quantities = judged?.id === id ? judged?.quantities : undefined;
  const exitance = quantities?.["radiant_exitance_mw_cm2"]?.value;
  const age = quantities?.["reading_age_days"]?.value;
  return (
    <span>
      {words.header.lamp} <b>{title ?? words.header.noLamp}</b>
      {exitance !== undefined && `: ${words.header.reading(String(Math.round(exitance)))}`}
      {age !== undefined && `, ${words.header.age(age)}`}
      {quantities !== undefined && exitance === undefined && `: ${words.header.noReading}`}
    </span>
  );
}

function ProtocolFacts({ state }: { readonly state: State }) {
  const protocol = state.answered?.report.protocol ?? state.start?.protocol;
  if (protocol === undefined) return null;
  return (
    <span>
      {words.header.protocol}{" "}
      <b>
        {protocol.id} {protocol.edition}
      </b>{" "}
      <code title={protocol.digest}>{protocol.digest.slice(0, 8)}</code>
    </span>
  );
}

function Verdict({ state }: { readonly state: State }) {
  const report = state.answered?.report;
  const busy = working(state);
  const refused = state.refused?.plan === state.plan;
  const settled = refused ? words.header.refused : (report?.verdict_says ?? "");
  return (
    <div class="verdict-place">
      <a class={`verdict ${refused ? "open" : (report?.verdict ?? "none")} ${busy ? "busy" : ""}`} href="#findings">
        {refused ? (
          <MarkShape mark="open" size={18} />
        ) : (
          report !== undefined && <MarkShape mark={report.verdict} size={18} />
        )}
        <span class="verdict-words">
          {settled || (state.start === null ? words.header.starting : words.header.working)}
        </span>
        {busy && settled !== "" && <span class="busy-word">{words.header.working}</span>}
      </a>
      {state.start === null && state.trouble === null && (
        <progress max="1" value={state.progress} aria-label={words.header.starting} />
      )}
      <Announced settled={settled} busy={busy} />
    </div>
  );
}

/** The verdict once it is settled, for those who hear the page; silent while an answer is on its way. */
function Announced({ settled, busy }: { readonly settled: string; readonly busy: boolean }) {
  return (
    <p class="unseen" role="status" aria-live="polite">
      {busy ? "" : settled}
    </p>
  );
}
