import { Formula } from '../components/formula.tsx';
import { Part } from '../components/part.tsx';
import { Tex } from '../components/tex.tsx';

const t = String.raw;

export function Intervals() {
  return (
    <Part id="intervals" aside="2000 bootstrap replicates, at 50, 80 and 95 %."
      notes={<p>The <strong>standard error</strong> is the standard deviation of the replicates. Two of its digits decide how many digits of a figure are printed.</p>}>
      <p className="prose">For each replicate <Tex>b</Tex> the frequencies <Tex>f_b</Tex> of every circuit are drawn anew, multinomially, from the smoothed frequencies <Tex>s</Tex>. The replicate is centred on the estimate <Tex>{t`\hat e`}</Tex> and then takes exactly one further pass:</p>
      <Formula id="replicate" />
      <p className="prose">A replicate that is not finite is dropped; if more than one in a hundred is, the figure is not determined. Let <Tex>q</Tex> be quantiles of the replicates of a figure (type 7) and <Tex>{t`\gamma`}</Tex> the level. Retained signal, gate loss, error per gate, angle error and readout loss have the percentile interval</p>
      <Formula id="percentile" />
      <p className="prose">Output error and prediction error are distances: their replicates lie above the estimate by as much as the estimate lies above the truth. Their interval is reflected about the estimate <Tex>{t`\hat\theta`}</Tex> and cut at zero:</p>
      <Formula id="reflected" />
      <p className="prose">Predicted probabilities carry the percentile interval at 95 %. Neither they nor their ends are clipped, so they may leave [0, 1] by a little. For a figure that is linear in the frequencies, with weights <Tex>W</Tex>, the variance of the replicates must agree with</p>
      <Formula id="linear-error" />
      <p className="prose">which is also how the widths of a planned run sheet are forecast.</p>
    </Part>
  );
}

export function RandomNumbers() {
  return (
    <Part id="random-numbers" aside="Nobody chooses a seed.">
      <p className="prose">All draws follow from the content id of the dataset, in hexadecimal, and the method version:</p>
      <Formula id="seed" />
      <p className="prose">The 32 bytes, little-endian, are the state of a xoshiro256** generator. Replicates, misfit and sealed check of every patch have streams of their own: the stream of patch <Tex>i</Tex>, counted from zero, lies <Tex>3i</Tex>, <Tex>3i + 1</Tex> and <Tex>3i + 2</Tex> jumps of <Tex>{'2^{128}'}</Tex> from the seed. Draws run replicate by replicate, circuits in the order of the file, outcomes ascending; fewer replicates are a prefix of more.</p>
      <p className="prose">A uniform number is the upper 53 bits of a word. Each outcome is a binomial of the shots left, with its share among the outcomes left. The first outcome of a circuit is drawn by inversion from a table, one uniform number each; the others by inversion where the mean is below ten, else by transformed rejection with squeeze.</p>
      <p className="prose">The method computes with additions, multiplications, divisions, square roots and whole numbers only, and takes its few transcendental functions from one library, because engines differ in the last digit of their own. That is what makes results equal to the last bit in Node and in a browser. An implementation that samples otherwise agrees within the error of 2000 replicates.</p>
    </Part>
  );
}
