import { type RefObject, useLayoutEffect, useState } from 'react'

/** Inner size of an element in whole pixels; 0 until it is known. */
export function useBoxSize(box: RefObject<HTMLElement | null>): { width: number; height: number } {
  const [size, setSize] = useState({ width: 0, height: 0 })
  useLayoutEffect(() => {
    const element = box.current
    if (!element) return
    const watch = new ResizeObserver(([entry]) =>
      setSize({ width: Math.floor(entry.contentRect.width), height: Math.floor(entry.contentRect.height) }),
    )
    watch.observe(element)
    return () => watch.disconnect()
  }, [box])
  return size
}
