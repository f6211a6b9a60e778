"use client";

import { useEffect, useRef, useState } from "react";

/** Width of an element as the page is laid out [px]; `usual` until it is known. */
export function useWidth<T extends HTMLElement>(usual: number) {
  const ref = useRef<T>(null);
  const [width, setWidth] = useState(usual);
  useEffect(() => {
    const element = ref.current;
    if (!element || typeof ResizeObserver === "undefined") return;
    const observer = new ResizeObserver(([entry]) => {
      if (entry.contentRect.width > 0) setWidth(entry.contentRect.width);
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, width] as const;
}
