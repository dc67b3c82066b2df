import type { Socket } from 'node:net'
import { Duplex } from 'node:stream'
import { createFrameMeter, type LargeFrame, largePublishOf, type LargePublish } from './frames'

export interface GuardOptions {
  maxBodyBytes: number
  /** Told once, when a packet larger than that begins. From then on everything that arrives is thrown away. */
  onLarge: (publish: LargePublish | undefined) => void
}

/** Enough of a large packet to read any topic of ours, its id and the first 64 bytes of what it says. */
const headBytesMax = 1_024
/** A peer that stops in the middle of such a head is judged by what there is. */
const headWaitMs = 2_000
const endWaitMs = 500

/**
 * A socket as the broker sees it: packets that are too large never come through, and reading can be held while
 * enough is under way. The broker alone would gather a packet of 256 MB before looking at it.
 */
export class GuardedSocket extends Duplex {
  private readonly meter
  private large: { frame: LargeFrame; head: Buffer; timer: NodeJS.Timeout } | undefined
  private isDeaf = false
  private isHeld = false
  private wantsMore = false

  constructor(
    private readonly socket: Socket,
    private readonly options: GuardOptions,
  ) {
    super({ allowHalfOpen: false })
    this.meter = createFrameMeter(options.maxBodyBytes)
    socket.on('data', (chunk: Buffer) => this.receive(chunk))
    socket.on('end', () => this.push(null))
    socket.on('error', (error) => this.destroy(error))
    socket.on('close', () => this.destroy())
    socket.pause()
  }

  /** Reads no more until it is released: the peer's own buffers fill then, not ours. */
  hold(isHeld: boolean): void {
    this.isHeld = isHeld
    if (isHeld) this.socket.pause()
    else if (this.wantsMore) this.socket.resume()
  }

  /** Throws away whatever arrives from now on. */
  turnDeaf(): void {
    this.isDeaf = true
    clearTimeout(this.large?.timer)
    this.socket.resume()
  }

  /**
   * Says the last words and closes, so that the peer can read them: a socket that is closed with bytes left unread
   * would cut them off.
   */
  async endGently(lastWords?: Uint8Array): Promise<void> {
    this.turnDeaf()
    if (this.socket.destroyed) return
    await new Promise<void>((resolve) => {
      const timer = setTimeout(resolve, endWaitMs)
      this.socket.once('close', () => {
        clearTimeout(timer)
        resolve()
      })
      if (lastWords) this.socket.end(lastWords)
      else this.socket.end()
    })
    this.destroy()
  }

  override _read(): void {
    this.wantsMore = true
    if (!this.isHeld) this.socket.resume()
  }

  override _write(chunk: Buffer, _encoding: BufferEncoding, done: (error?: Error | null) => void): void {
    this.socket.write(chunk, done)
  }

  override _writev(
    chunks: { chunk: Buffer; encoding: BufferEncoding }[],
    done: (error?: Error | null) => void,
  ): void {
    this.socket.write(Buffer.concat(chunks.map((one) => one.chunk)), done)
  }

  override _final(done: (error?: Error | null) => void): void {
    this.socket.end(() => done())
  }

  override _destroy(error: Error | null, done: (error?: Error | null) => void): void {
    clearTimeout(this.large?.timer)
    this.socket.destroy()
    done(error)
  }

  private receive(chunk: Buffer): void {
    if (this.isDeaf) return
    if (this.large) return this.gather(chunk)
    const fed = this.meter.feed(chunk)
    if (fed.isGarbage) return void this.destroy(new Error('not MQTT'))
    if (fed.large) {
      // What came before it goes through. Its header does too; without a body nothing comes of that.
      this.push(chunk.subarray(0, fed.allowed))
      this.large = {
        frame: fed.large,
        head: Buffer.alloc(0),
        timer: setTimeout(() => this.judge(), headWaitMs),
      }
      return this.gather(chunk.subarray(fed.allowed))
    }
    this.wantsMore = this.push(chunk)
    if (!this.wantsMore) this.socket.pause()
  }

  private gather(chunk: Buffer): void {
    if (!this.large) return
    this.large.head = Buffer.concat([this.large.head, chunk]).subarray(0, headBytesMax)
    if (this.large.head.length >= Math.min(headBytesMax, this.large.frame.bodyBytes)) this.judge()
  }

  private judge(): void {
    if (!this.large || this.isDeaf) return
    this.turnDeaf()
    this.options.onLarge(largePublishOf(this.large.frame, this.large.head))
  }
}
