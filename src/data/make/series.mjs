// Derives the series of Moon and planets from the data folder of the npm package astronomia 4.2.0:
//   npm pack astronomia@4.2.0 && tar xf astronomia-4.2.0.tgz
//   node series.mjs package/data ..
// Terms are cut by size and numbers are rounded by what they can change within 1900-2100.
import { writeFileSync } from 'node:fs'
import { pathToFileURL } from 'node:url'
import { resolve, join } from 'node:path'

const [source, target] = process.argv.slice(2)
if (!source || !target) throw new Error('usage: node series.mjs DATA_FOLDER OUTPUT_FOLDER')
const load = async (name) => (await import(pathToFileURL(resolve(source, name)).href)).default

/** The shortest decimal within `tolerance` of x. */
function shortest (x, tolerance) {
  if (Math.abs(x) <= tolerance) return '0'
  const digits = Math.max(1, Math.ceil(Math.log10(Math.abs(x) / tolerance)))
  for (let n = Math.max(1, digits - 1); n <= 17; n++) {
    const text = x.toPrecision(n)
    if (Math.abs(Number(text) - x) > tolerance) continue
    const value = Number(text)
    const plain = String(value).replace(/^(-?)0\./, '$1.')
    const power = value.toExponential().replace('e+', 'e')
    return plain.length <= power.length ? plain : power
  }
  return String(x)
}

const moonHeader = [
  '# Moon: ELP/MPP02 with constants fitted to DE405, truncated: {rows} terms of 35901, all that the package carries in its short file.',
  '# source: J. Chapront & G. Francou 2003, "The lunar theory ELP revisited", A&A 404, 735; as carried by npm astronomia 4.2.0',
  '# (package MIT; the terms are published data), data/elpMppDe.js.']

async function moon () {
  const m = await load('elpMppDe.js')
  const rows = []
  for (const c of ['L', 'B', 'R']) {
    for (const power of Object.keys(m[c])) {
      for (const [a, ...f] of m[c][power]) {
        // 2e-6 arcsecond or km at the most from each rounded number; |T| <= 1 century.
        const inPhase = 2e-6 / Math.max(Math.abs(a), 1e-9)
        const phases = f.map((x, k) => shortest(x, Math.min(inPhase, k === 0 ? 1e-3 : 1e-2)))
        rows.push([c, power, shortest(a, 5e-7 * (Number(power) ? 0.1 : 1)), ...phases].join(','))
      }
    }
  }
  const header = moonHeader.map((l) => l.replace('{rows}', rows.length))
  header.push('# Sum of amplitude * T^power * sin(phase0 + phase1 T + phase2 T^2 + phase3 T^3 + phase4 T^4), T = Julian centuries (TDB) since J2000;',
    '# L and B in arcseconds, R in km (its constant term is the first); longitude = W1(T) (elp_mpp02_w1.csv) + L. Inertial mean ecliptic of date, longitudes from',
    '# its departure point (J2000). Numbers are shortened: each by less than 2e-6 arcsecond or km of its term within |T| <= 1.',
    'coordinate,power,amplitude,phase0,phase1,phase2,phase3,phase4')
  writeFileSync(join(target, 'elp_mpp02.csv'), header.concat(rows).join('\n') + '\n')
  const w1 = [...moonHeader.slice(1), '# Mean longitude of the Moon, W1 = sum of w1_rad * T^power, radians, T = Julian centuries (TDB) since J2000.',
    'power,w1_rad', ...m.W1.map((x, k) => `${k},${x}`)]
  writeFileSync(join(target, 'elp_mpp02_w1.csv'), w1.join('\n') + '\n')
  report('moon', m, rows, 1)
}

// semi-major axis in au and the least distance from the Earth: how much a heliocentric error is seen enlarged
const planets = {
  mercury: [0.387, 0.55], venus: [0.723, 0.26], mars: [1.524, 0.37], jupiter: [5.20, 3.9],
  saturn: [9.55, 8.0], uranus: [19.2, 17.3], neptune: [30.1, 28.8]
}
const smallest = 1e-9 // radian, geocentric

async function planet (name) {
  const m = await load(`vsop87B${name}.js`)
  const [axis, nearest] = planets[name]
  const threshold = Math.min(1, nearest / axis) * smallest
  const rows = []
  let all = 0
  for (const c of ['L', 'B', 'R']) {
    const limit = threshold * (c === 'R' ? axis : 1)
    for (const power of Object.keys(m[c])) {
      for (const [a, b, f] of m[c][power]) {
        all++
        const seen = Math.abs(a) * 0.1 ** Number(power)
        if (seen < limit) continue
        const inPhase = 0.05 * limit / seen
        rows.push([c, power, shortest(a, 0.05 * limit / 0.1 ** Number(power)), shortest(b, inPhase), shortest(f, inPhase * 10)].join(','))
      }
    }
  }
  const cut = report(name, m, rows, 0.1)
  const header = [
    `# ${name[0].toUpperCase() + name.slice(1)}: VSOP87B, heliocentric, dynamical ecliptic and equinox J2000; ${rows.length} terms of the package's ${all}.`,
    '# source: P. Bretagnon & G. Francou 1988, "Planetary theories in rectangular and spherical variables", A&A 202, 309; as carried by npm',
    `# astronomia 4.2.0 (package MIT; the terms are published data), data/vsop87B${name}.js.`,
    '# Sum of amplitude * T^power * cos(phase + frequency * T), T = Julian millennia (TDB) since J2000; L and B in radians, R in au.',
    `# Cut: amplitude * 0.1^power below ${threshold.toExponential(1)} rad (times ${axis} au for R), numbers shortened to a twentieth of that. Largest change of place`,
    `# over 1900-2100 by cut and rounding together, measured: L ${cut[0].toExponential(1)} rad, B ${cut[1].toExponential(1)} rad, R ${cut[2].toExponential(1)} au.`,
    'coordinate,power,amplitude,phase,frequency']
  writeFileSync(join(target, `vsop87b_${name}.csv`), header.concat(rows).join('\n') + '\n')
}

/** Largest difference of the whole and the shortened series at 401 instants. */
function report (name, m, rows, span) {
  const moonSeries = name === 'moon'
  const parsed = rows.map((r) => r.split(',')).map((r) => [r[0], Number(r[1]), ...r.slice(2).map(Number)])
  const term = (t, p, a, f) => {
    let x = 0
    for (let k = f.length - 1; k >= 0; k--) x = x * t + f[k]
    return a * t ** p * (moonSeries ? Math.sin(x) : Math.cos(x))
  }
  const worst = [0, 0, 0]
  for (let i = 0; i <= 400; i++) {
    const t = span * (i / 200 - 1)
    ;['L', 'B', 'R'].forEach((c, k) => {
      let whole = 0
      let short = 0
      for (const p of Object.keys(m[c])) for (const [a, ...f] of m[c][p]) whole += term(t, Number(p), a, f)
      for (const [c2, p, a, ...f] of parsed) if (c2 === c) short += term(t, p, a, f)
      worst[k] = Math.max(worst[k], Math.abs(whole - short))
    })
  }
  console.log(name, rows.length, worst.map((x) => x.toExponential(1)).join(' '))
  return worst
}

await moon()
for (const name of Object.keys(planets)) await planet(name)
