import { contents } from './sections'

export function ContentsList() {
  return (
    <nav aria-label="On this page" className="px-4 sm:px-0 lg:sticky lg:top-6">
      <p aria-hidden="true" className="text-label font-semibold text-ink-soft">
        On this page
      </p>
      <ul className="grid gap-x-6 max-lg:grid-cols-2 max-sm:grid-cols-1">
        {contents.map(({ id, title }) => (
          <li key={id}>
            <a
              href={`#${id}`}
              className="inline-flex min-h-11 items-center text-heart underline decoration-1 underline-offset-4 hover:decoration-2 lg:min-h-9"
            >
              {title}
            </a>
          </li>
        ))}
      </ul>
    </nav>
  )
}
