// Derives the periodic terms of Jupiter's four bright moons from the npm package astronomia 4.2.0:
//   npm pack astronomia@4.2.0 && tar xf astronomia-4.2.0.tgz
//   node jupiter_moons.mjs package/src/jupitermoons.js ../jupiter_moons.csv
// Reads the published numbers out of the text of its sums and writes each term as a row.
import { readFileSync, writeFileSync } from 'node:fs'

const [source, target] = process.argv.slice(2)
if (!source || !target) throw new Error('usage: node jupiter_moons.mjs SOURCE.js OUTPUT.csv')
const text = readFileSync(source, 'utf8')

const greek = { π: 'p', ω: 'w', ψ: 'psi', Π: 'Pi', Φλ: 'Phi', Gʹ: 'G2', G: 'G', l: 'l', L: 'L', Σ: 'S' }
/** "2 * (l1 - l2) + 52.225 * p" as { l1: 2, l2: -2, deg: 52.225 }. */
function argument (expression, moon) {
  const sums = {}
  const add = (body, factor) => {
    for (const [, sign, number, name] of body.matchAll(/([+-]?)\s*(?:([\d.]+)\s*\*?\s*)?([lLπωΣ]\d|Φλ|Gʹ|ψ|Π|G|p\b)/gu)) {
      const value = (sign === '-' ? -1 : 1) * Number(number ?? 1) * factor
      let key = name === 'p' ? 'deg' : greek[name] ?? greek[name[0]] + name[1]
      // The moon's own true longitude and the sum of its own terms.
      if (/^[LS]\d$/.test(key)) {
        if (key[1] !== String(moon)) throw new Error(`moon ${moon} with ${key}`)
        key = key[0]
      }
      sums[key] = (sums[key] ?? 0) + value
    }
  }
  const factored = expression.match(/^(\d) \* \((.*)\)$/u)
  if (factored) add(factored[2], Number(factored[1]))
  else add(expression, 1)
  return Object.entries(sums).filter(([, v]) => v !== 0)
    .map(([k, v], i) => `${v < 0 ? '-' : i ? '+' : ''}${Math.abs(v) === 1 ? '' : Math.abs(v)}${k}`).join(' ')
}

const rows = []
function collect (moon, quantity, body, pattern) {
  let n = 0
  for (const [, amplitude, inner] of body.matchAll(pattern)) {
    rows.push(`${moon},${quantity},${Number(amplitude)},${argument(inner.trim(), moon)}`)
    ++n
  }
  const written = (body.match(/Math\.(sin|cos)\(/g) ?? []).length
  if (n !== written) throw new Error(`moon ${moon} ${quantity}: ${n} of ${written} terms`)
  return n
}
const inner = '((?:[^()]|\\([^()]*\\))*)'
const section = (from, to) => text.slice(text.indexOf(from), text.indexOf(to, text.indexOf(from)))
for (let moon = 1; moon <= 4; moon++) {
  const after = moon < 4 ? `const Σ${moon + 1}` : 'const L1'
  collect(moon, 'longitude', section(`const Σ${moon} =`, after), new RegExp(`(-?[\\d.]+) \\* p \\* Math\\.sin\\(${inner}\\)`, 'gu'))
}
const latitudes = section('const B = [', 'R = [').split('Math.atan(').slice(1)
latitudes.forEach((body, i) => collect(i + 1, 'latitude', body, new RegExp(`(-?[\\d.]+) \\* Math\\.sin\\(${inner}\\)`, 'gu')))
const radii = section('R = [', '// p. 311').split('* (1 +').slice(1)
radii.forEach((body, i) => collect(i + 1, 'radius', body, new RegExp(`(-?[\\d.]+) \\* Math\\.cos\\(${inner}\\)`, 'gu')))

writeFileSync(target, [
  '# Jupiter\'s four bright moons, theory E5: periodic terms. Longitude: degrees, of sines; latitude: of sines, the sum is its tangent;',
  '# radius: parts of the mean one, of cosines. Arguments as the paper names them: l1..l4 mean longitudes, p perijoves, w nodes, psi,',
  '# G and G2 mean anomalies of Jupiter and Saturn, Pi, Phi; L the moon\'s own true longitude, S the sum of its own terms of longitude; deg degrees.',
  '# source: J. H. Lieske 1998, "Galilean satellite ephemerides E5", A&AS 129, 205, as J. Meeus, Astronomical Algorithms, 2nd ed. 1998, ch. 44, shortens it;',
  '# numbers as carried by npm astronomia 4.2.0 (package MIT; the terms are published data), src/jupitermoons.js.',
  'moon,quantity,amplitude,argument',
  ...rows].join('\n') + '\n')
console.log(`${rows.length} terms`)
