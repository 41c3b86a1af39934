/** What a measured effect was measured on, in words: the closed-form signals that the golden tests build again. */
export const onPair = 'measured on spins 0 and 0.2, equal masses, 60 M☉, curve G2 from 20 Hz: match 0.9185';
export const onLoud = 'measured on equal masses without spin, 60 M☉ at 1000 Mpc, curve G2 from 20 Hz: SNR 36.30';
export const onEnergy = 'measured on equal masses without spin from MΩ = 0.02: energy 0.0399 M';
export const onRecoil = 'measured on mass ratio 2 without spin from MΩ = 0.02: 141.9 km/s';
