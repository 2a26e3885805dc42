/** Small signs on buttons, drawn so that no letter set needs to hold them. */

const LINES = {
  undo: "M7 4 3 8l4 4M3 8h8a5 5 0 0 1 0 10H8",
  redo: "m13 4 4 4-4 4M17 8H9a5 5 0 0 0 0 10h3",
  up: "M10 17V4M4.5 9.5 10 4l5.5 5.5",
  down: "M10 3v13M4.5 10.5 10 16l5.5-5.5",
  look: "M10 3a7 7 0 1 0 0 14a7 7 0 0 0 0-14zM10 3v14M10 6.5h5M10 10h7M10 13.5h5",
} as const;

export function Icon({ name }: { readonly name: keyof typeof LINES }) {
  return (
    <svg class="icon" width="20" height="20" viewBox="0 0 20 20" aria-hidden="true">
      <path d={LINES[name]} />
    </svg>
  );
}
