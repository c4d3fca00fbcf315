import { inserter } from '../inserter'
import { prepared } from '../prepared'
import { sighting } from './table'

export const sightingQueries = prepared(db => ({ insert: inserter(db, sighting) }))
