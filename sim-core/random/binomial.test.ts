import { describeBinomialQuantile } from '#sim-core/testing/binomial-quantile.ts';
import { binomialQuantile } from './binomial.ts';

describeBinomialQuantile('of the reference kernel', binomialQuantile);
