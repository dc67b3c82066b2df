import { serialize } from 'node:v8'
import { siteYear } from './site-year'

/** One simulated year as a process of its own, so that a machine's cores share the seeds. The score goes out as bytes. */
process.stdout.write(serialize(siteYear(Number(process.argv[2]))))
