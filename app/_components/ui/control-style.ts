/** The edge, ground and height that every typed control shares. */
export const controlClassName =
  'min-h-11 w-full rounded border border-edge bg-board px-3 text-ink placeholder:text-ink-soft aria-invalid:border-2 aria-invalid:border-warn disabled:border-dashed disabled:text-ink-soft'
