/**
 * Which folder may import which of our own folders: the one table of borders. The lint configuration is made from
 * it, so changing a border means changing it here. Scripts, seeders and tests may import anything.
 */
export const MAY_IMPORT = {
  'lib/chemistry': [],
  'lib/hazards': ['lib/chemistry', 'lib/domain'],
  'lib/planning': ['lib/chemistry', 'lib/hazards', 'lib/domain'],
  'lib/domain': [],
  'lib/config': ['lib/domain'],
  'lib/schemas': ['lib/domain', 'lib/chemistry', 'lib/hazards', 'lib/planning'],
  models: ['lib/domain', 'lib/config', 'migrations'],
  migrations: ['models'],
  'lib/services': [
    'models',
    'lib/domain',
    'lib/config',
    'lib/schemas',
    'lib/chemistry',
    'lib/hazards',
    'lib/planning',
  ],
  'lib/http': ['lib/services', 'lib/domain', 'lib/config', 'lib/schemas'],
  'lib/client': ['lib/domain', 'lib/schemas', 'lib/chemistry', 'lib/hazards', 'lib/planning'],
  components: ['lib/client', 'lib/domain', 'lib/schemas', 'lib/chemistry', 'lib/hazards', 'lib/planning'],
  app: [
    'components',
    'lib/client',
    'lib/http',
    'lib/services',
    'lib/config',
    'lib/domain',
    'lib/schemas',
    'lib/chemistry',
    'lib/hazards',
    'lib/planning',
    'fonts',
  ],
};

/** Folders that compute and nothing else, with the packages they may use. */
export const PURE = {
  'lib/chemistry': [],
  'lib/hazards': [],
  'lib/planning': ['highs'],
};
