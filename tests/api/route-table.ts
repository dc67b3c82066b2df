import type { Arranging, Row } from './route-row'
import { benchRows } from './bench-rows'

/** One moment for the whole walk: two bodies of the same things must be the same to the letter. */
const tomorrow = new Date(Date.now() + 86_400_000).toISOString()

/** A point of P-256, as a browser gives one; its private half is nobody's. */
const phoneKey = 'BJr-ThmUBi-kurNW5UdatHvDs2fIGFYEYYYgP9Sn-BvcOJOJVCxAA_CjLdIW7CBSEpHYbjOVWNH23A1HsKQ2w00'

const start = ({ asOwner, site }: Arranging) =>
  asOwner('POST', `/carries/${site.things.carry}/start`, { againstAdvice: true })

/** The hour of the carry that is put off. */
const plannedFor = new Date(Date.now() + 7_200_000).toISOString()
const planFor = ({ db, site }: Arranging) =>
  db
    .updateTable('carry')
    .set({ planned_at: plannedFor })
    .where('site_id', '=', site.siteId)
    .where('code', '=', site.things.carry)
    .execute()

const callOff = ({ asOwner, site }: Arranging) => asOwner('POST', `/carries/${site.things.carry}/call-off`)

export const routeTable: Record<string, Row> = {
  'GET /api/health': { action: 'anyone' },
  'GET /api/v1/demo/inbox': { action: 'anyone' },
  'POST /api/v1/demo/sign-in': { action: 'anyone' },

  'GET /api/v1/door/[doorToken]': { action: 'anyone' },

  'POST /api/v1/push/subscriptions': {
    action: 'signed-in',
    body: () => ({
      endpoint: 'https://push.example.org/walk',
      keys: { p256dh: phoneKey, auth: 'a'.repeat(22) },
    }),
    status: 204,
  },
  'DELETE /api/v1/push/subscriptions': {
    action: 'signed-in',
    body: () => ({ endpoint: 'https://push.example.org/walk' }),
    status: 204,
  },
  // What a link may do stands in it alone; one that was not signed here leads nowhere.
  'POST /api/v1/answers/[link]': { action: 'anyone', status: 404 },
  'GET /api/v1/unsubscribe/[link]': { action: 'anyone', status: 303 },
  'POST /api/v1/unsubscribe/[link]': { action: 'anyone', status: 404, isPressedByServers: true },

  'GET /api/v1/sites': { action: 'signed-in' },
  'POST /api/v1/sites': {
    action: 'signed-in',
    body: () => ({
      name: 'New Yard',
      timeZone: 'Europe/London',
      rooms: [{ name: 'Landing cupboard', kind: 'cupboard' }],
    }),
    status: 201,
  },
  'GET /api/v1/invitations/[invitation]': { action: 'signed-in', status: 403 },
  'POST /api/v1/invitations/[invitation]/accept': { action: 'signed-in', status: 403 },

  'GET /api/v1/sites/[site]': { action: 'site:see' },
  'PATCH /api/v1/sites/[site]': {
    action: 'site:change',
    body: () => ({ name: 'Renamed Yard', lockUpAt: '17:30' }),
    ifMatch: true,
  },
  'DELETE /api/v1/sites/[site]': {
    action: 'site:delete',
    body: (_, { siteName }) => ({ name: siteName }),
    status: 204,
  },
  'GET /api/v1/sites/[site]/frame': { action: 'site:see' },

  'GET /api/v1/sites/[site]/doors': { action: 'doors:see' },
  'POST /api/v1/sites/[site]/doors': {
    action: 'doors:change',
    body: ({ room }) => ({ name: 'By the shop door', roomId: room }),
    status: 201,
  },
  'DELETE /api/v1/sites/[site]/doors/[door]': { action: 'doors:change', status: 204 },

  'GET /api/v1/sites/[site]/members': { action: 'members:see' },
  'PATCH /api/v1/sites/[site]/members/[member]': {
    action: 'members:change',
    body: () => ({ role: 'hand' }),
  },
  'DELETE /api/v1/sites/[site]/members/[member]': { action: 'members:change', status: 204 },
  'GET /api/v1/sites/[site]/members/me': { action: 'settings:own' },
  'PATCH /api/v1/sites/[site]/members/me': {
    action: 'settings:own',
    body: () => ({ unitSystem: 'imperial', onHouseList: true, digest: 'daily' }),
    ifMatch: true,
  },
  'GET /api/v1/sites/[site]/members/me/hearing': { action: 'settings:own' },
  'DELETE /api/v1/sites/[site]/members/me': {
    action: 'settings:own',
    status: 204,
    // A second owner, so that the first may go.
    prepare: ({ db, site }) =>
      db.updateTable('member').set({ role: 'owner' }).where('id', '=', site.things.member).execute(),
  },
  'GET /api/v1/sites/[site]/invitations': { action: 'invitations:see' },
  'POST /api/v1/sites/[site]/invitations': {
    action: 'invitations:change',
    body: () => ({ email: 'somebody.new@example.org', role: 'maker' }),
    status: 201,
  },
  'DELETE /api/v1/sites/[site]/invitations/[invitation]': { action: 'invitations:change', status: 204 },
  'POST /api/v1/sites/[site]/invitations/[invitation]/resend': { action: 'invitations:change' },

  'GET /api/v1/sites/[site]/now': { action: 'now:see' },
  'GET /api/v1/sites/[site]/rooms': { action: 'rooms:see' },
  'POST /api/v1/sites/[site]/rooms': {
    action: 'rooms:change',
    body: () => ({ name: 'Study', kind: 'house' }),
    status: 201,
  },
  'GET /api/v1/sites/[site]/rooms/[room]': { action: 'rooms:see' },
  'PATCH /api/v1/sites/[site]/rooms/[room]': {
    action: 'rooms:change',
    body: () => ({ name: 'Airing cupboard' }),
    ifMatch: true,
  },
  'DELETE /api/v1/sites/[site]/rooms/[room]': {
    action: 'rooms:change',
    ifMatch: true,
    status: 204,
    // A room that something is in stays; this one is cleared first.
    prepare: async ({ db, site: { siteId } }) => {
      for (const table of ['carry_piece', 'piece_place', 'carry', 'piece', 'placement', 'sensor'] as const)
        await db.deleteFrom(table).where('site_id', '=', siteId).execute()
    },
  },
  'GET /api/v1/sites/[site]/rooms/[room]/series': {
    action: 'rooms:readings',
    query: () => ({ from: '2026-01-01T00:00:00Z', to: '2026-02-01T00:00:00Z' }),
  },
  'GET /api/v1/sites/[site]/rooms/[room]/forecast': { action: 'rooms:forecast' },
  'GET /api/v1/sites/[site]/rooms/[room]/felt': {
    action: 'rooms:readings',
    query: () => ({ thicknessMm: '4,10', wood: 'fraxinus-excelsior', days: '30' }),
  },

  'POST /api/v1/sites/[site]/rooms/[room]/readings': {
    action: 'readings:type',
    body: () => ({ temperatureC: 18.5, humidityPct: 52 }),
    status: 201,
  },

  'GET /api/v1/sites/[site]/sensors': { action: 'sensors:see' },
  'POST /api/v1/sites/[site]/sensors': {
    action: 'sensors:change',
    body: ({ room }) => ({ name: 'Window sill', roomId: room }),
    status: 201,
  },
  'GET /api/v1/sites/[site]/sensors/[sensor]': { action: 'sensors:see' },
  'PATCH /api/v1/sites/[site]/sensors/[sensor]': {
    action: 'sensors:change',
    body: () => ({ name: 'Top shelf' }),
    ifMatch: true,
  },
  'DELETE /api/v1/sites/[site]/sensors/[sensor]': { action: 'sensors:change', ifMatch: true, status: 204 },
  'GET /api/v1/sites/[site]/sensors/[sensor]/readings': { action: 'sensors:see' },
  'GET /api/v1/sites/[site]/sensors/[sensor]/placements': { action: 'sensors:see' },
  'POST /api/v1/sites/[site]/sensors/[sensor]/placements': {
    action: 'sensors:change',
    body: ({ shop }) => ({ roomId: shop, spot: 'by the door' }),
    status: 201,
  },
  'POST /api/v1/sites/[site]/sensors/[sensor]/credential': { action: 'sensors:change', status: 201 },
  'GET /api/v1/sites/[site]/refused': { action: 'refused:see' },

  'GET /api/v1/sites/[site]/carries': { action: 'carries:see', query: () => ({ state: 'open' }) },
  'POST /api/v1/sites/[site]/carries': {
    action: 'carries:do',
    body: ({ piece, shop }) => ({
      pieceIds: [piece],
      toRoomId: shop,
      cover: 'open',
      stayMinutes: 30,
      plannedAt: tomorrow,
    }),
    status: 201,
  },
  'POST /api/v1/sites/[site]/carries/check': {
    action: 'carries:see',
    body: ({ piece, shop }) => ({ pieceIds: [piece], toRoomId: shop, cover: 'open', stayMinutes: 30 }),
  },
  'GET /api/v1/sites/[site]/carries/[carry]': { action: 'carries:see' },
  'PATCH /api/v1/sites/[site]/carries/[carry]': {
    action: 'carries:do',
    body: ({ piece }) => ({ stayMinutes: 45, pieceIds: [piece] }),
    ifMatch: true,
  },
  'POST /api/v1/sites/[site]/carries/[carry]/start': {
    action: 'carries:do',
    body: () => ({ againstAdvice: true }),
  },
  'POST /api/v1/sites/[site]/carries/[carry]/cover': {
    action: 'carries:do',
    body: ({ piece }) => ({ pieceIds: [piece], cover: 'bagged' }),
    prepare: start,
  },
  'POST /api/v1/sites/[site]/carries/[carry]/bring-back': {
    action: 'carries:do',
    body: ({ piece, room }) => ({ pieceIds: [piece], roomId: room }),
    prepare: start,
  },
  'POST /api/v1/sites/[site]/carries/[carry]/undo': {
    action: 'carries:do',
    prepare: async (arranging) => {
      await start(arranging)
      await arranging.asOwner('POST', `/carries/${arranging.site.things.carry}/bring-back`, {})
    },
  },
  'POST /api/v1/sites/[site]/carries/[carry]/call-off': { action: 'carries:do' },
  'POST /api/v1/sites/[site]/carries/[carry]/put-off': {
    action: 'carries:do',
    body: () => ({ from: plannedFor, to: tomorrow }),
    prepare: planFor,
  },
  'POST /api/v1/sites/[site]/carries/[carry]/put-back': { action: 'carries:do' },
  'POST /api/v1/sites/[site]/carries/[carry]/skip-ask': {
    action: 'pieces:record',
    body: ({ piece }) => ({ pieceId: piece }),
  },
  'GET /api/v1/sites/[site]/carries/how-good': { action: 'carries:see' },
  'GET /api/v1/sites/[site]/carries/[carry]/forgotten': { action: 'carries:see' },

  'GET /api/v1/sites/[site]/lock-up': { action: 'carries:see' },
  'POST /api/v1/sites/[site]/lock-up/nothing-else': {
    action: 'carries:do',
    body: () => ({ isNothing: true }),
  },
  'POST /api/v1/sites/[site]/lock-up/close': { action: 'carries:do', body: () => ({ isClosed: true }) },

  'GET /api/v1/sites/[site]/repeats': { action: 'carries:see' },
  'POST /api/v1/sites/[site]/repeats': {
    action: 'carries:do',
    body: ({ piece, shop }) => ({
      ...{ pieceIds: [piece], toRoomId: shop, cover: 'open' },
      ...{ weekdays: [2, 5], atTime: '09:00', stayMinutes: 60 },
    }),
    status: 201,
  },
  'PATCH /api/v1/sites/[site]/repeats/[repeat]': {
    action: 'carries:do',
    body: ({ piece }) => ({ atTime: '10:30', pieceIds: [piece] }),
    ifMatch: true,
  },
  'DELETE /api/v1/sites/[site]/repeats/[repeat]': { action: 'carries:do', ifMatch: true, status: 204 },
  'POST /api/v1/sites/[site]/repeats/[repeat]/restore': { action: 'carries:do' },

  'GET /api/v1/sites/[site]/species': {
    action: 'woods:see',
    query: () => ({ q: 'walnut burl', away: 'no', sort: 'best', limit: '10' }),
  },
  'POST /api/v1/sites/[site]/species': {
    action: 'woods:change',
    body: () => ({ commonName: 'Field maple', latinName: 'Acer campestre', densityKgM3: 690 }),
    status: 201,
  },
  'GET /api/v1/sites/[site]/species/[wood]': { action: 'woods:see' },
  'PATCH /api/v1/sites/[site]/species/[wood]': {
    action: 'woods:change',
    body: () => ({ movementClass: 'large', note: 'from the hedge' }),
    ifMatch: true,
  },
  'DELETE /api/v1/sites/[site]/species/[wood]': { action: 'woods:change', ifMatch: true, status: 204 },
  'POST /api/v1/sites/[site]/species/[wood]/restore': {
    action: 'woods:change',
    prepare: ({ db, site: { siteId } }) =>
      db.updateTable('site_wood').set({ archived_at: new Date() }).where('site_id', '=', siteId).execute(),
  },
  'GET /api/v1/sites/[site]/pieces': {
    action: 'pieces:see',
    query: ({ room }) => ({ room, sort: '-created' }),
  },
  'POST /api/v1/sites/[site]/pieces': {
    action: 'pieces:change',
    body: ({ room, shop }) => ({
      number: 'W2',
      wood: 'juglans-nigra',
      jointDiameterMm: 58,
      fitGrade: 'snug',
      roomId: room,
      keepRoomId: room,
      fittedRoomId: shop,
    }),
    status: 201,
  },
  'GET /api/v1/sites/[site]/pieces/[piece]': { action: 'pieces:see' },
  'PATCH /api/v1/sites/[site]/pieces/[piece]': {
    action: 'pieces:change',
    body: ({ room, shop, wood }) => ({ finish: 'wax', wood, keepRoomId: room, fittedRoomId: shop }),
    ifMatch: true,
  },
  'DELETE /api/v1/sites/[site]/pieces/[piece]': {
    action: 'pieces:change',
    ifMatch: true,
    status: 204,
    prepare: callOff,
  },
  'POST /api/v1/sites/[site]/pieces/[piece]/restore': {
    action: 'pieces:change',
    prepare: ({ db, site: { siteId } }) =>
      db.updateTable('piece').set({ archived_at: new Date() }).where('site_id', '=', siteId).execute(),
  },
  'POST /api/v1/sites/[site]/pieces/[piece]/events': {
    action: 'pieces:move',
    body: ({ shop }) => ({ kind: 'move', roomId: shop }),
    status: 201,
    prepare: callOff,
  },
  'GET /api/v1/sites/[site]/pieces/[piece]/events': { action: 'pieces:record' },
  'POST /api/v1/sites/[site]/pieces/[piece]/events/[event]/undo': { action: 'pieces:record' },
  'POST /api/v1/sites/[site]/pieces/[piece]/events/[event]/restore': { action: 'pieces:record' },
  'GET /api/v1/sites/[site]/pieces/[piece]/fit': {
    action: 'pieces:record',
    query: ({ shop }) => ({ room: shop, stayMinutes: '60', cover: 'bagged', fitGrade: 'easy' }),
  },
  'GET /api/v1/sites/[site]/pieces/[piece]/outcomes': { action: 'pieces:record' },
  'POST /api/v1/sites/[site]/pieces/[piece]/outcomes': {
    action: 'pieces:record',
    body: ({ carry }) => ({ turned: 'tighter', carryId: carry }),
    status: 201,
    prepare: async (arranging) => {
      await start(arranging)
      await arranging.asOwner('POST', `/carries/${arranging.site.things.carry}/bring-back`, {})
    },
  },
  'POST /api/v1/sites/[site]/pieces/[piece]/outcomes/[outcome]/undo': { action: 'pieces:record' },
  'POST /api/v1/sites/[site]/pieces/[piece]/outcomes/[outcome]/restore': { action: 'pieces:record' },
  'GET /api/v1/sites/[site]/pieces/[piece]/weighings': {
    action: 'pieces:weigh',
    query: () => ({ limit: '20' }),
  },
  'POST /api/v1/sites/[site]/pieces/[piece]/weighings': {
    action: 'pieces:weigh',
    body: () => ({ grams: 183, stepG: 0.1 }),
    status: 201,
  },
  'DELETE /api/v1/sites/[site]/pieces/[piece]/weighings/[weighing]': { action: 'pieces:weigh', status: 204 },
  'POST /api/v1/sites/[site]/pieces/[piece]/weighings/[weighing]/restore': { action: 'pieces:weigh' },

  'GET /api/v1/sites/[site]/notices': { action: 'notices:see', query: () => ({ unseen: 'yes' }) },
  'PATCH /api/v1/sites/[site]/notices/[notice]': {
    action: 'notices:acknowledge',
    body: () => ({ isSeen: true, isAcknowledged: true }),
  },
  'GET /api/v1/sites/[site]/rules': { action: 'rules:see' },
  'PATCH /api/v1/sites/[site]/rules': {
    action: 'rules:change',
    body: ({ room }) => ({ rule: 'too-dry', isOn: true, settings: { rh: 32, rooms: [room] } }),
    ifMatch: true,
  },
  'POST /api/v1/sites/[site]/rules/preview': {
    action: 'rules:see',
    body: () => ({ rule: 'too-dry', settings: { rh: 32 } }),
  },
  'POST /api/v1/sites/[site]/rules/undo': {
    action: 'rules:change',
    body: () => ({ rule: 'too-dry' }),
    ifMatch: true,
    // A change to undo that left the rule at the version that is sent.
    prepare: async ({ db, site: { siteId } }) => {
      await db.insertInto('rule').values({ site_id: siteId, rule: 'too-dry', is_on: false }).execute()
      await db
        .insertInto('change')
        .values({
          site_id: siteId,
          subject_kind: 'rule',
          subject_code: 'too-dry',
          action: 'change',
          before: JSON.stringify({ isOn: true, settings: {} }),
        })
        .execute()
    },
  },
  'GET /api/v1/sites/[site]/notices/asks': { action: 'notices:see' },
  'POST /api/v1/sites/[site]/notices/test': { action: 'notices:acknowledge', status: 201 },
  'GET /api/v1/sites/[site]/notices/[notice]/deliveries': { action: 'notices:see' },
  'POST /api/v1/sites/[site]/notices/[notice]/retry': { action: 'notices:acknowledge' },
  'POST /api/v1/sites/[site]/notices/[notice]/answers': {
    action: 'notices:acknowledge',
    body: () => ({ answer: 'going' }),
    prepare: ({ db, site: { siteId } }) =>
      db
        .updateTable('notice')
        .set({ rule: 'time-out', urgency: 'now' })
        .where('site_id', '=', siteId)
        .execute(),
  },
  'POST /api/v1/sites/[site]/notices/seen': { action: 'notices:acknowledge', status: 204 },
  'GET /api/v1/sites/[site]/live': { action: 'site:see' },

  ...benchRows,
}
