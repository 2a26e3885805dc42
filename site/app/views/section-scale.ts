/** Where things stand in the section drawing: millimetres to pixels, one scale for both directions. */
import type { Drawing } from "../types";
import type { Size } from "./size";

const GUTTER = 40;
const PLOT = 162;
const PLOT_NARROW = 140;
const FIGURES = 72;
const TIP_BODY = 34;
const BELOW_PULP = 38;
const WALL_MM = 2.1;
const MOST_PER_MM = 44;
/** How far below the floor the pulp is drawn when the dentine left is not known. */
const UNKNOWN_DENTINE_MM = 1.5;

export interface Scale {
  readonly perMm: number;
  readonly wallMm: number;
  readonly tipBody: number;
  readonly dentineMm: number;
  readonly gutter: number;
  readonly toothRight: number;
  readonly plotLeft: number;
  readonly plotRight: number;
  readonly bottom: number;
  /** Pixels of a place across the cavity, 0 at its middle. */
  x(mm: number): number;
  /** Pixels of a depth below the opening. */
  y(mm: number): number;
}

export function sectionScale({ cavity, tip, increments }: Drawing, { width, height }: Size): Scale {
  const plot = width < 440 ? PLOT_NARROW : PLOT;
  const top = Math.min(0, ...increments.map((increment) => increment.top_mm));
  const dentineMm = cavity.remaining_dentine_mm ?? UNKNOWN_DENTINE_MM;
  const across = Math.max(tip.diameter_mm + 0.6, cavity.width_mm + 2 * WALL_MM + 0.6);
  const upright = Math.max(tip.gap_mm, -top, 1.2) + cavity.depth_mm + dentineMm;
  const room = { width: width - GUTTER - plot, height: height - TIP_BODY - BELOW_PULP - 6 };
  const perMm = Math.max(4, Math.min(MOST_PER_MM, room.width / across, room.height / upright));
  const centre = GUTTER + room.width / 2;
  const slack = Math.max(0, room.height - upright * perMm);
  const opening = 4 + TIP_BODY + Math.max(tip.gap_mm, -top, 1.2) * perMm + slack / 2;
  return {
    perMm,
    wallMm: WALL_MM,
    tipBody: TIP_BODY,
    dentineMm,
    gutter: GUTTER,
    toothRight: width - plot,
    plotLeft: width - plot + FIGURES,
    plotRight: width - 8,
    bottom: height - 2 - slack / 4,
    x: (mm) => centre + mm * perMm,
    y: (mm) => opening + mm * perMm,
  };
}

/** A place on the plot's axis of shares, by doublings, kept inside the axis. */
export function shareAxis(
  drawing: Drawing,
  scale: Scale,
): { readonly ticks: readonly number[]; at(share: number): number } {
  const shares = drawing.increments
    .flatMap((increment) => increment.profile.map(([, share]) => share))
    .filter((share) => share > 0);
  const least = Math.max(-4, Math.min(-1, Math.floor(Math.log2(Math.min(1, ...shares)))));
  const most = Math.min(6, Math.max(1, Math.ceil(Math.log2(Math.max(2, ...shares)))));
  const width = scale.plotRight - scale.plotLeft;
  return {
    ticks: Array.from({ length: most - least + 1 }, (_, index) => 2 ** (least + index)),
    at: (share) =>
      scale.plotLeft +
      (width * (Math.min(most, Math.max(least, Math.log2(Math.max(share, 1e-9)))) - least)) / (most - least),
  };
}

/** How much ink a share of the need gets: a quarter at the need, more by doublings. */
export function inkOf(share: number): number {
  return Math.min(0.92, Math.max(0.03, 0.26 + 0.2 * Math.log2(Math.max(share, 1e-9))));
}
