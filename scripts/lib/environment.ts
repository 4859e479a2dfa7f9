import { readSettings, type Settings } from '../../server/utils/settings'
import { explainShortly, Failure } from './failure'

/** The settings of this process; what is wrong with them is the caller's to put right. */
export function settingsFromEnvironment(): Settings {
  try {
    return readSettings(process.env)
  }
  catch (error) {
    throw new Failure(explainShortly(error))
  }
}
