export * from './audit'
export * from './breweries'
export * from './cellar'
export * from './people'
