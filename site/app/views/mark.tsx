/** The mark of a finding: a shape that tells without its colour. */
import type { Mark } from "../types";
import { words } from "../words/index";

const SHAPES: Record<Mark, string> = {
  stop: "M1.5 1.5h11v11h-11z",
  revise: "M7 .4 13.6 7 7 13.6.4 7z",
  open: "M7 1.6 12.4 7 7 12.4 1.6 7z",
  watch: "M7 1.2a5.8 5.8 0 1 1 0 11.6A5.8 5.8 0 0 1 7 1.2z",
  clear: "M7 2a5 5 0 1 1 0 10A5 5 0 0 1 7 2z",
};

export function MarkShape({ mark, size = 14 }: { readonly mark: Mark; readonly size?: number }) {
  return (
    <svg class={`mark ${mark}`} width={size} height={size} viewBox="0 0 14 14" aria-hidden="true">
      <path d={SHAPES[mark]} />
    </svg>
  );
}

/** The same shape inside another drawing, centred at a point. */
export function MarkAt({
  mark,
  x,
  y,
  size = 11,
}: {
  readonly mark: Mark;
  readonly x: number;
  readonly y: number;
  readonly size?: number;
}) {
  return (
    <path
      class={`mark ${mark}`}
      d={SHAPES[mark]}
      transform={`translate(${x - size / 2} ${y - size / 2}) scale(${size / 14})`}
    />
  );
}

export function MarkWord({ mark }: { readonly mark: Mark }) {
  return (
    <span class={`mark-word ${mark}`}>
      <MarkShape mark={mark} /> {words.marks[mark]}
    </span>
  );
}
