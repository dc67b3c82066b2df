export default function DoorNotFound() {
  return (
    <main className="flex min-h-dvh flex-col justify-center gap-6 bg-board p-10 text-[28px] leading-9">
      <h1 className="text-[44px] leading-tight font-semibold">This link opens no door any more</h1>
      <p>It was taken back, or it was not copied whole. A maker makes a new one under People and place.</p>
    </main>
  )
}
