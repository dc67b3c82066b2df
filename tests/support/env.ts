/** Names of our own configuration: a test sets them itself and never takes what a developer's shell has. */
const own =
  /^(DATABASE_URL|PORT|LISTEN_HOST|BASE_URL|SMTP_URL|MAIL_FROM|AUTH_|MQTT_|LIDFAST_|PEER_|VAPID_|PUSH_|LOG_LEVEL|DATA_DIR)/

/** The environment for processes that tests start. */
export const cleanEnvironment = (): Record<string, string | undefined> => ({
  ...Object.fromEntries(Object.entries(process.env).filter(([name]) => !own.test(name))),
  NO_COLOR: '1',
  FORCE_COLOR: undefined,
})

/** A file that describes an installation that runs already, such as `.lidfast/run.json` of `npm run dev`. */
export const givenStackFile = (): string | undefined => process.env.LIDFAST_TEST_STACK

/** Set where the tests run unattended. */
export const isUnattended = (): boolean => process.env.CI !== undefined
