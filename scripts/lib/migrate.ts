import { migrateDatabase } from '../../server/database/migrate'
import { settingsFromEnvironment } from './environment'
import { explainShortly, Failure } from './failure'

try {
  const { databaseOwnerUrl } = settingsFromEnvironment()
  if (databaseOwnerUrl === undefined) throw new Failure('DATABASE_OWNER_URL is not given: the address of the database as the role that owns it.')
  await migrateDatabase(databaseOwnerUrl)
  console.log('The database is up to this version.')
}
catch (error) {
  console.error(`The database was not migrated. ${explainShortly(error)}`)
  process.exitCode = 1
}
