const tex = String.raw;

/** The numbered formulas in the order of the page; a formula's number is its place in this list. */
const list = [
  ['vectors', [tex`\rho_a = \frac{\operatorname{tr}(P_a\,\rho)}{\sqrt d},`, tex`M_a = \frac{\operatorname{tr}(P_a\,M)}{\sqrt d},`, tex`G_{ab} = \frac{1}{d}\operatorname{tr}\!\left(P_a\,U P_b\,U^{\dagger}\right)`]],
  ['product', [tex`p(o \mid g_1 \ldots g_L) = M_o \cdot G_{g_L} \cdots G_{g_1}\, \rho`]],
  ['errors', [tex`\tilde G_k = (1 + E_k)\,G_k,`, tex`\tilde\rho = \rho + \delta\rho,`, tex`\tilde M_o = M_o + \delta M_o`]],
  ['columns', [tex`n_{\mathrm{columns}} = K\,D(D-1) + (D-1) + (d-1)\,D`]],
  ['steps', [tex`f_j = G_{g_j} \cdots G_{g_1}\,\rho,`, tex`b_{o,j} = M_o\,G_{g_L} \cdots G_{g_{j+1}}`]],
  ['row', [tex`\frac{\partial p_o}{\partial E_k} = \sum_{j\,:\,g_j = k} b_{o,j} \otimes f_j,`, tex`\frac{\partial p_o}{\partial\,\delta\rho} = b_{o,0},`, tex`\frac{\partial p_o}{\partial\,\delta M_o} = f_L`]],
  ['rank', [tex`r = \#\{\, i : \sigma_i > 10^{-9}\,\sigma_1 \,\}`]],
  ['gauge', [tex`E_k = X - G_k X G_k^{\mathsf T},`, tex`\delta\rho = X\rho,`, tex`\delta M_o = -X^{\mathsf T} M_o`]],
  ['inverse', [tex`C^{+} = \left(C^{\mathsf T} C + c\,QQ^{\mathsf T}\right)^{-1} C^{\mathsf T},`, tex`\sigma_r^2 \le c \le \sigma_1^2`]],
  ['passes', [tex`e_1 = C^{+}\bigl(f - p(0)\bigr),`, tex`e_{t+1} = e_t + C^{+}\bigl(f - p(e_t)\bigr), \quad t = 1, \ldots, 7`]],
  ['settled', [tex`\operatorname{rms}\bigl(p(e_8) - p(e_7)\bigr) < 0.1\,\operatorname{rms}\sqrt{\frac{s\,(1 - s)}{N}},`, tex`s = \frac{n_o + \frac12}{N + \frac d2}`]],
  ['estimable', [tex`\lVert N^{\mathsf T} w \rVert \le 10^{-6}\,\lVert w \rVert`]],
  ['retained', [tex`R_L = \frac{\sum_{c,o} \left(p - \frac1d\right)\left(\hat p - \frac1d\right)}{\sum_{c,o} \left(p - \frac1d\right)^2}`]],
  ['output', [tex`\Delta_L = \frac{1}{n_L} \sum_{c} \tfrac12 \sum_{o} \left| \hat p - p \right|`]],
  ['per-gate', [tex`r = (1 - \lambda)\,\frac{D - 1}{D},`, tex`\frac1K \sum_k \tilde G'_k\,X\,G_k'^{-1} = \lambda\,X`]],
  ['loss', [tex`\ell_k = 1 - \frac1D \sum_{i=1}^{D} \operatorname{Re}\left(\bar\mu_i\,\lambda_i\right)`]],
  ['angle', [tex`\theta_k = \arg\Bigl(\bar\mu \cdot \tfrac{1}{m} \sum_{i\,:\,\mu_i = \mu} \lambda_i\Bigr)`]],
  ['readout', [tex`\ell_{\mathrm{readout}} = 1 - R_0`]],
  ['prediction', [tex`\varepsilon = \frac1n \sum_{c\ \mathrm{sealed}} \tfrac12 \sum_o \left| \hat p - f \right|,`, tex`z = \frac{\varepsilon - \bar\varepsilon}{\operatorname{sd}(\varepsilon_b)}`]],
  ['misfit', [tex`S = \sum_{c,o} \left(f - \hat p\right)^2,`, tex`S_b = \bigl\lVert (1 - CC^{+})(f_b - \hat p) \bigr\rVert^2`]],
  ['replicate', [tex`e_b = \hat e + C^{+}(f_b - s),`, tex`e_b \leftarrow e_b + C^{+}\bigl(f + f_b - s - p(e_b)\bigr)`]],
  ['percentile', [tex`\left[\, q_{(1-\gamma)/2},\; q_{(1+\gamma)/2} \,\right]`]],
  ['reflected', [tex`\left[\, \max\bigl(0,\; 2\hat\theta - q_{(1+\gamma)/2}\bigr),\; \max\bigl(0,\; 2\hat\theta - q_{(1-\gamma)/2}\bigr) \,\right]`]],
  ['linear-error', [tex`\operatorname{var}\hat\theta = W\,\Sigma\,W^{\mathsf T},`, tex`\Sigma = \bigoplus_{c} \frac{\operatorname{diag}(s) - s\,s^{\mathsf T}}{N}`]],
  ['seed', [tex`\mathrm{seed} = \operatorname{SHA\text{-}256}\bigl(\text{content id} \,\Vert\, \texttt{":"} \,\Vert\, \text{method version}\bigr)`]],
  ['pair-t', [tex`t_{ij} = \frac{\left|\hat\theta_i - \hat\theta_j\right|}{s_{ij}},`, tex`t^{*}_b = \max_{(i,j)} \frac{\left|(\theta_{i,b} - \theta_{j,b}) - (\hat\theta_i - \hat\theta_j)\right|}{s_{ij}}`]],
  ['places', [tex`1 + \#\{\text{surely better}\} \;\le\; \text{rank} \;\le\; m - \#\{\text{surely worse}\}`]],
] as const;

export type FormulaId = (typeof list)[number][0];

export interface NumberedFormula {
  id: FormulaId;
  number: number;
  /** Parts that may stand on lines of their own where the page is narrow. */
  parts: readonly string[];
}

export const formulas: readonly NumberedFormula[] = list.map(([id, parts], i) => ({ id, number: i + 1, parts }));

/** A numbered formula by its id. */
export const formulaOf = (id: FormulaId): NumberedFormula => {
  const found = formulas.find((formula) => formula.id === id);
  if (!found) throw new RangeError(`there is no formula ${id}`);
  return found;
};
