/** The findings, worst first, what is clear in one folded line, and why a plan cannot be checked at all. */
import { distinct, grouped, type Group } from "../groups";
import type { State } from "../state";
import type { Finding, Problem, Report } from "../types";
import { words } from "../words/index";
import { MarkShape, MarkWord } from "./mark";
import { Ruler } from "./ruler";

/** How many sentences of one rule are shown below its first. */
const FEW = 3;

export function Findings({ state, stale }: { readonly state: State; readonly stale: boolean }) {
  const refused = state.refused?.plan === state.plan ? state.refused.problems : null;
  const report = state.answered?.report;
  return (
    <section
      class={stale ? "findings stale" : "findings"}
      id="findings"
      aria-label={words.findings.title}
      tabIndex={-1}
    >
      <h2>{words.findings.title}</h2>
      {refused !== null && <Refusal problems={refused} past={report !== undefined} />}
      {report === undefined ? (
        refused === null && <p class="hint">{words.findings.none}</p>
      ) : (
        <Told report={report} pages={pagesOf(state)} />
      )}
    </section>
  );
}

export function Refusal({ problems, past }: { readonly problems: readonly Problem[]; readonly past: boolean }) {
  return (
    <div class="refusal" role="alert">
      <h3>{words.findings.refused}</h3>
      <ul>
        {problems.map((problem, index) => (
          <li key={index}>{problem.message}</li>
        ))}
      </ul>
      {past && <p class="hint">{words.findings.stale}</p>}
    </div>
  );
}

function Told({ report, pages }: { readonly report: Report; readonly pages: (rule: string) => string }) {
  const clear = report.findings.filter((finding) => finding.finding === "clear");
  const standing = report.findings.filter((finding) => finding.standing);
  const rest = report.findings.filter((finding) => finding.finding !== "clear" && !finding.standing);
  return (
    <>
      <ol class="list">
        {grouped(rest).map((group) => (
          <li key={group.key}>
            <One group={group} pages={pages} />
          </li>
        ))}
      </ol>
      {standing.length > 0 && <Standing groups={grouped(standing)} pages={pages} />}
      {clear.length > 0 && (
        <details class="clear-ones">
          <summary>
            <MarkShape mark="clear" /> {report.clear_says}
          </summary>
          <ul>
            {grouped(clear).map(({ key, findings: [first] }) => (
              <li key={key}>
                <a href={pages(first.rule)}>{first.title}</a>
              </li>
            ))}
          </ul>
          {report.not_applied.length > 0 && <p class="hint">{words.findings.notApplied(report.not_applied.length)}</p>}
        </details>
      )}
    </>
  );
}

/** What is so whatever the plan, because a card leaves it open: one line folded, with the remedy inside. */
function Standing({
  groups,
  pages,
}: {
  readonly groups: readonly Group[];
  readonly pages: (rule: string) => string;
}) {
  return (
    <details class="standing-ones">
      <summary>
        <MarkShape mark="watch" /> {words.findings.standing(groups.length)}
      </summary>
      <ol class="list">
        {groups.map((group) => (
          <li key={group.key}>
            <One group={group} pages={pages} />
          </li>
        ))}
      </ol>
    </details>
  );
}

function One({ group, pages }: { readonly group: Group; readonly pages: (rule: string) => string }) {
  const { findings, mark } = group;
  const [first] = findings;
  const page = pages(first.rule);
  return (
    <article class={`finding ${mark}`}>
      <MarkWord mark={mark} />
      <div class="told">
        <Sayings says={distinct(findings.map((finding) => finding.says))} />
        <Ruler findings={findings} />
        {distinct(findings.map((finding) => finding.do)).map((text) => (
          <p key={text} class="do">
            {text}
          </p>
        ))}
        {distinct(findings.map((finding) => finding.caution)).map((text) => (
          <p key={text} class="caution">
            <b>{words.findings.caution}.</b> {text}
          </p>
        ))}
        {findings.some((finding) => finding.changed !== null && finding.changed !== undefined) && (
          <p class="changed">{words.findings.changed}</p>
        )}
        <Grounds finding={first} page={page} />
      </div>
    </article>
  );
}

/** What each of a group says; of many, those past the first few are folded, and the fold says how many. */
function Sayings({ says: [first, ...others] }: { readonly says: readonly string[] }) {
  const folded = others.length > FEW ? others.slice(FEW) : [];
  return (
    <>
      <h3>{first}</h3>
      {others.slice(0, FEW).map((says) => (
        <p key={says} class="says">
          {says}
        </p>
      ))}
      {folded.length > 0 && (
        <details>
          <summary>{words.findings.more(folded.length)}</summary>
          {folded.map((says) => (
            <p key={says} class="says">
              {says}
            </p>
          ))}
        </details>
      )}
    </>
  );
}

/** The requirement, with its rule's page, and what it rests on. */
function Grounds({ finding, page }: { readonly finding: Finding; readonly page: string }) {
  const strengths: Readonly<Record<string, string>> = words.findings.strength;
  return (
    <p class="grounds">
      <a class="rule" href={page}>
        {finding.title}
      </a>
      <span>{strengths[finding.strength] ?? finding.strength}</span>
      {finding.sources.map((source) => (
        <a key={source} href={`${page}#sources`}>
          {cited(source)}
        </a>
      ))}
    </p>
  );
}

/** "rueggeberg-1994" as it is read aloud. */
function cited(source: string): string {
  const [name = "", ...rest] = source.split("-");
  if (words.findings.bodies.includes(name)) return [name.toUpperCase(), ...rest].join(" ");
  return [name.charAt(0).toUpperCase() + name.slice(1), ...rest].join(" ");
}

function pagesOf(state: State): (rule: string) => string {
  return (id) => state.start?.rules.find((rule) => rule.id === id)?.page ?? `rules/${id}/`;
}
