import { type Markup, markup } from '../markup.js';
import { significant } from '../number-format.js';
import type { OtherEmitter } from '../other-emitters.js';
import { termMark } from '../term-mark.js';

/** This design beside direct emitters, in lumens per watt from the wall. @param own null: not known. @param wall W, null: not known */
export function comparison(others: readonly OtherEmitter[], own: number | null, wall: number | null): Markup {
  const most = Math.max(own ?? 0, ...others.map(({ lumensPerWatt }) => lumensPerWatt[2]));
  const at = (value: number) => (100 * value) / most;
  const lumens = (value: number) =>
    wall === null ? null : markup`<td class="number">${significant(value * wall, 3)}</td>`;
  return markup`<h3>The same wall power in other hands${termMark('direct-emitters')}</h3><div class="scroll"><table class="comparison"><thead><tr><th scope="col">emitter</th><th scope="col" class="number">lm/W</th>${
    wall === null ? null : markup`<th scope="col" class="number">lm from ${significant(wall, 3)} W</th>`
  }<th scope="col"><span class="unseen">bar</span></th></tr></thead><tbody><tr class="own"><th scope="row">this design</th><td class="number">${own === null ? 'not known' : significant(own, 3)}</td>${
    own === null ? (wall === null ? null : markup`<td></td>`) : lumens(own)
  }<td class="range">${own === null ? null : markup`<span class="output" style="left:0;width:${at(own).toFixed(1)}%"></span>`}</td></tr>${others.map(
    ({ name, lumensPerWatt: [low, middle, high] }) =>
      markup`<tr><th scope="row">${name} <span class="note">typical</span></th><td class="number">${significant(middle, 2)} <span class="note">(${significant(low, 2)} to ${significant(high, 2)})</span></td>${lumens(middle)}<td class="range"><span class="spread" style="left:${at(low).toFixed(1)}%;width:${(at(high) - at(low)).toFixed(1)}%"></span><span class="middle" style="left:${at(middle).toFixed(1)}%"></span></td></tr>`,
  )}</tbody></table></div><p class="note">The rows marked typical are common practice, from memory, for products of the early 2020s behind a typical driver; they are not of this run. Green light is reckoned as a single wavelength with V(λ) of CIE 1931. Lumens are not all: how small a spot and how narrow a beam they leave from decides which emitter fits.</p>`;
}
