import { afterAll, beforeAll } from 'vitest'
import { beginFloor, endFloor } from './swap/floor'
import { foundAsItWas } from './swap/as-found'
import { otherSwaps } from './swap/others'
import { withoutReception } from './swap/reception'
import { wholeSwap } from './swap/whole'

/* From a dead unit to a released one, on a phone of 390 px at night, as a tired technician does it: one server for all walks. */

beforeAll(beginFloor)
afterAll(endFloor)

wholeSwap()
otherSwaps()
foundAsItWas()
withoutReception()
