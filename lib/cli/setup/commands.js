/** The batch commands, in the order of the help. Their bodies are bundled TypeScript. */
export const BATCH_COMMANDS = [
  'import',
  'rank',
  'minima',
  'curves',
  'regional',
  'windows',
  'breaks',
  'pair',
  'export',
  'backup',
  'restore',
  'serve',
];

export const HELP = `Hungerstone tells which rivers of a region are losing their low flows, how fast and how surely.

Usage: npx hungerstone COMMAND [options]

  import    take in flows, a station registry and map layers
  rank      the stations in order of trend in their annual minima
  minima    the annual minima of every station
  curves    normalised duration curves
  regional  what the stations say together, beyond chance
  windows   the trend for every start and end year
  breaks    levels before and after breaks that were known or chosen
  pair      one station against reference stations
  export    a region as one archive of open formats
  backup    write the whole database to one file
  restore   put a backup back
  serve     run the site on this machine

  start     what \`npm start\` runs: set-up, the demo region if there is no region, serve
  dev       the same with code reloaded as it changes
  test      every test
  check     types, format, import floors, sizes, licences
  bench     times and sizes
  validate  what the methods promise, simulated

npx hungerstone COMMAND --help tells the options of import to serve. Results go to stdout or --out, progress to stderr.
Exit codes: 0 done, 1 failed and nothing changed, 2 wrong usage; import also 3: taken in, with rejected rows.
`;
