/** The room an element has, in units that grow with the reader's letters, so that a drawing's own letters grow with them. */
import type { RefObject } from "preact";
import { useLayoutEffect, useRef, useState } from "preact/hooks";

export interface Size {
  readonly width: number;
  readonly height: number;
  /** Pixels to one unit: 1 where the root letter is 16 pixels high. */
  readonly unit: number;
}

const LETTER_PX = 16;

export function useSize<E extends HTMLElement>(): [RefObject<E | null>, Size] {
  const element = useRef<E | null>(null);
  const [size, setSize] = useState<Size>({ width: 0, height: 0, unit: 1 });
  useLayoutEffect(() => {
    const box = element.current;
    if (box === null) return undefined;
    const measure = () => {
      const unit = parseFloat(getComputedStyle(document.documentElement).fontSize) / LETTER_PX;
      const [width, height] = [box.clientWidth / unit, box.clientHeight / unit];
      setSize((old) => (old.width === width && old.height === height ? old : { width, height, unit }));
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(box);
    return () => observer.disconnect();
  }, []);
  return [element, size];
}
