/** The ruler under a finding: where the plan stands against the rule's limits. */
import { rulerScale } from "../ruler-scale";
import type { Finding, Measured } from "../types";
import { words } from "../words/index";
import { MarkAt } from "./mark";
import { useSize } from "./size";

const [LINE, HEIGHT, LETTER] = [38, 66, 7.6];

interface RulerProps {
  readonly findings: readonly Finding[];
}

export function Ruler({ findings }: RulerProps) {
  const [box, { width, unit }] = useSize<HTMLDivElement>();
  const measured = findings
    .map((finding) => finding.measured)
    .filter((each): each is Measured => each !== null && each.against.length > 0);
  const first = measured[0];
  if (first === undefined) return null;
  const { least, most, zones } = rulerScale(measured);
  const x = (value: number) => 8 + ((Math.min(most, Math.max(least, value)) - least) / (most - least)) * (width - 16);
  return (
    <div class="ruler" ref={box}>
      {width > 0 && (
        <svg
          width={width * unit}
          height={HEIGHT * unit}
          viewBox={`0 0 ${width} ${HEIGHT}`}
          role="img"
          aria-label={saidOf(measured)}
        >
          {zones.map((zone) => (
            <g key={zone.from}>
              <path class={`zone ${zone.mark}`} d={`M${x(zone.from)} ${LINE}H${x(zone.to)}`} />
              {x(zone.to) - x(zone.from) > 22 && (
                <MarkAt mark={zone.mark} x={(x(zone.from) + x(zone.to)) / 2} y={LINE} />
              )}
            </g>
          ))}
          <Limits measured={first} at={x} width={width} />
          <Pointers findings={findings} at={x} width={width} />
        </svg>
      )}
    </div>
  );
}

function Limits({
  measured,
  at,
  width,
}: {
  readonly measured: Measured;
  readonly at: (value: number) => number;
  readonly width: number;
}) {
  const limits = [...new Map(measured.against.map((limit) => [limit.value, limit])).values()].sort(
    (a, b) => a.value - b.value,
  );
  let taken = -Infinity;
  return (
    <g class="limits">
      {limits.map((limit) => {
        const half = (limit.shown.length * LETTER) / 2;
        const place = Math.min(width - half, Math.max(half, at(limit.value)));
        const room = place - half > taken;
        if (room) taken = place + half + 4;
        return (
          <g key={limit.value}>
            <path d={`M${at(limit.value)} ${LINE - 9}v18`} />
            {room && (
              <text x={place} y={HEIGHT - 4} text-anchor="middle">
                {limit.shown}
              </text>
            )}
          </g>
        );
      })}
    </g>
  );
}

/** One pointer a finding, numbered by increment where there are several. */
function Pointers({
  findings,
  at,
  width,
}: RulerProps & { readonly at: (value: number) => number; readonly width: number }) {
  let taken = -Infinity;
  const sorted = findings
    .flatMap((finding) => (finding.measured === null ? [] : [{ finding, measured: finding.measured }]))
    .sort((a, b) => a.measured.value - b.measured.value);
  return (
    <g>
      {sorted.map(({ finding, measured }, index) => {
        const x = at(measured.value);
        const label = sorted.length === 1 ? `${measured.shown} ${measured.unit}`.trim() : measured.shown;
        const half = (label.length * LETTER) / 2;
        const place = Math.min(width - half, Math.max(half, x));
        const room = place - half > taken;
        if (room) taken = place + half + 4;
        return (
          <g key={index} class={`pointer ${finding.finding}`}>
            <path d={`M${x} ${LINE - 3}l-6 -12h12z`} />
            {room && (
              <text x={place} y={LINE - 20} text-anchor="middle">
                {label}
              </text>
            )}
          </g>
        );
      })}
    </g>
  );
}

function saidOf(measured: readonly Measured[]): string {
  return measured
    .map((each) =>
      words.findings.ruler(
        each.label,
        `${each.shown} ${each.unit}`.trim(),
        each.against.map((limit) => words.findings.limit(words.marks[limit.finding], limit.side, limit.shown)),
      ),
    )
    .join(" ");
}
