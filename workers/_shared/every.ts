export interface Loop {
  /** Runs now instead of at the next turn; a call while it runs makes it run once more afterwards. */
  nudge(): void
  /** Stops the loop and waits for a run that is under way. */
  stop(): Promise<void>
}

export interface LoopOptions {
  intervalMs: number
  onError: (error: unknown) => void
}

/** Runs `work` at once and then again `intervalMs` after each end, never twice at a time. A failure doesn't end the loop. */
export function every({ intervalMs, onError }: LoopOptions, work: () => Promise<void>): Loop {
  let timer: NodeJS.Timeout | undefined
  let running: Promise<void> | undefined
  let again = false
  let stopped = false

  const run = () => {
    clearTimeout(timer)
    again = false
    running = work()
      .catch(onError)
      .then(() => {
        running = undefined
        if (stopped) return
        if (again) run()
        else timer = setTimeout(run, intervalMs)
      })
  }
  run()

  return {
    nudge() {
      if (stopped) return
      if (running) again = true
      else run()
    },
    async stop() {
      stopped = true
      clearTimeout(timer)
      await running
    },
  }
}
