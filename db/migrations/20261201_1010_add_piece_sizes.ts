import { type Kysely, sql } from 'kysely'

/** Sizes that the wood model takes besides the joint's, and what the ready rule goes by. */
const statements = [
  `alter table piece
    add column lid_wall_mm real check (lid_wall_mm > 0 and lid_wall_mm <= 60),
    add column blank_diameter_mm real check (blank_diameter_mm > 0 and blank_diameter_mm <= 600),
    add column ends_sealed boolean not null default false,
    add column roughed_on date,
    add column ready_by_weight boolean not null default false,
    add column fit_lid_mc_pct real check (fit_lid_mc_pct >= 0 and fit_lid_mc_pct <= 30)`,
  `alter table site add column scale_step_g real check (scale_step_g > 0 and scale_step_g <= 100)`,
]

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql.raw(`alter table site drop column scale_step_g`).execute(db)
  await sql
    .raw(
      `alter table piece drop column lid_wall_mm, drop column blank_diameter_mm, drop column ends_sealed,
        drop column roughed_on, drop column ready_by_weight, drop column fit_lid_mc_pct`,
    )
    .execute(db)
}
