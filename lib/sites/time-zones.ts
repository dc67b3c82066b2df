/** Every time zone that this runtime knows, by name; UTC first, as it is missing from the runtime's own list. */
export function knownTimeZones(): string[] {
  return ['UTC', ...Intl.supportedValuesOf('timeZone').filter((zone) => zone !== 'UTC')]
}
