// Places of Jupiter's four bright moons for tests/reference/jupiter_moons.csv, by the npm package astronomia 4.2.0 (MIT), a
// general-purpose library of published algorithms: its own E5 routine on its own VSOP87B series. Run:
//   npm pack astronomia@4.2.0 && tar xf astronomia-4.2.0.tgz
//   node jupiter_moons.mjs package ../jupiter_moons.csv
import { pathToFileURL } from 'node:url'
import { resolve } from 'node:path'
import { writeFileSync } from 'node:fs'

const [root, target] = process.argv.slice(2)
if (!root || !target) throw new Error('usage: node jupiter_moons.mjs PACKAGE OUTPUT.csv')
const load = async (name) => (await import(pathToFileURL(resolve(root, name)).href))
const { e5 } = await load('src/jupitermoons.js')
const { Planet } = await load('src/planetposition.js')
const earth = new Planet((await load('data/vsop87Bearth.js')).default)
const jupiter = new Planet((await load('data/vsop87Bjupiter.js')).default)

const rows = []
// 2020 January 1 to 2035 December, 64 instants at all hours.
for (let i = 0; i < 64; i++) {
  const jd = 2458849.5 + 92.137 * i
  e5(jd, earth, jupiter).forEach((moon, m) =>
    rows.push([jd.toFixed(4), m + 1, moon.x.toFixed(5), moon.y.toFixed(5), (-moon.z).toFixed(4)].join(',')))
}
writeFileSync(target, [
  '# Jupiter\'s four bright moons (1 Io ... 4 Callisto), in equatorial radii of Jupiter: x to the west, y to the north, z to the Earth.',
  '# source: npm astronomia 4.2.0 (MIT), e5() on its VSOP87B series: another program on the same published theory (Lieske 1998, E5, as',
  '# J. Meeus 1998, ch. 44, shortens it), so it proves the terms and the geometry, not the theory. Made by tests/reference/make/jupiter_moons.mjs.',
  'jd_tt,moon,x,y,z',
  ...rows].join('\n') + '\n')
console.log(`${rows.length} rows`)
