/**
 * Lets a pointer set the cursor: press, or press and drag, without a modifier key (those zoom and pan).
 * @param move gets the place of the pointer from the left of the element [CSS px]
 * @returns takes the listeners away
 */
export function followPointer(
  element: HTMLElement,
  move: (left: number) => void,
  start: () => void,
): () => void {
  let active = false
  const place = (event: PointerEvent) => {
    move(event.clientX - element.getBoundingClientRect().left)
  }
  const down = (event: PointerEvent) => {
    if (event.button !== 0 || event.shiftKey || event.ctrlKey || event.metaKey || event.altKey) return
    active = true
    element.setPointerCapture(event.pointerId)
    start()
    place(event)
  }
  const moved = (event: PointerEvent) => {
    if (active) place(event)
  }
  const up = () => {
    active = false
  }
  // a press on a canvas would take the focus from what `start` has just given it to
  const keepFocus = (event: MouseEvent) => event.preventDefault()
  element.addEventListener('mousedown', keepFocus)
  element.addEventListener('pointerdown', down)
  element.addEventListener('pointermove', moved)
  element.addEventListener('pointerup', up)
  element.addEventListener('pointercancel', up)
  return () => {
    element.removeEventListener('mousedown', keepFocus)
    element.removeEventListener('pointerdown', down)
    element.removeEventListener('pointermove', moved)
    element.removeEventListener('pointerup', up)
    element.removeEventListener('pointercancel', up)
  }
}
