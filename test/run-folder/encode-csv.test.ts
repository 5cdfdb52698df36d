import { describe, expect, it } from 'vitest';
import { anglesCsv, ledgerCsv, mapCsv, radianceCsv, spectraCsv } from '../../src/run-folder/encode-csv.js';
import { sampleRun } from './sample-run.js';

const { record, arrays } = sampleRun();
const lines = (csv: string) => csv.trimEnd().split('\n');

describe('tables of a run', () => {
  it('map of a face: cell centres by hand, blank off the face', () => {
    expect(lines(mapCsv(arrays.maps[0]))).toEqual([
      'u_mm,v_mm,irradiance_W_per_cm2,area_mm2',
      '1,-2,0,8',
      '3,-2,1,8',
      '5,-2,2,8',
      '1,2,3,8',
      '3,2,4,8',
      '5,2,,0',
    ]);
  });

  it('map of voxels: the first axis runs fastest', () => {
    expect(lines(mapCsv(arrays.maps[3]))).toEqual([
      'x_mm,y_mm,z_mm,absorbed_power_density_W_per_cm3,volume_mm3',
      '0.5,0.5,11,1,2',
      '1.5,0.5,11,2,2',
      '0.5,0.5,13,3,2',
      '1.5,0.5,13,4,2',
    ]);
  });

  it('spectra: a row per wavelength, a column per spectrum, hostile names held', () => {
    expect(lines(spectraCsv(arrays.spectra))).toEqual([
      'wavelength_nm,exit_per_nm,"detector-=a,""b"" -pump_per_nm"',
      '500,0.001,0',
      '550,0.3333333333333333,1e-300',
    ]);
  });

  it('angles: centres of the cells, azimuth fastest', () => {
    expect(lines(anglesCsv(arrays.angles[0]))).toEqual([
      'polar_deg,azimuth_deg,radiant_intensity_W_per_sr,luminous_intensity_cd',
      '15,90,1,6',
      '15,270,2,5',
      '45,90,3,4',
      '45,270,4,3',
      '75,90,5,2',
      '75,270,6,1',
    ]);
  });

  it('radiance: places and directions at the centres of their cells, degrees on a sphere', () => {
    const [radiance] = arrays.radiance;
    expect(lines(radianceCsv(radiance))).toEqual([
      'u_mm,v_mm,polar_from_normal_deg,azimuth_about_normal_deg,radiance_W_per_m2_sr',
      '1.5,0,22.5,180,1',
      '1.5,0,67.5,180,2',
      '4.5,0,22.5,180,3',
      '4.5,0,67.5,180,',
    ]);
    const ball = {
      ...radiance,
      extentDeg: [
        [0, 360],
        [0, 180],
      ] as const,
      axes: ['azimuth', 'polar angle'],
    };
    expect(lines(radianceCsv(ball)).slice(0, 2)).toEqual([
      'azimuth_deg,polar_angle_deg,polar_from_normal_deg,azimuth_about_normal_deg,radiance_W_per_m2_sr',
      '90,90,22.5,180,1',
    ]);
  });

  it('ledger: all rows of both, each summing to 1', () => {
    const [header, ...rows] = lines(ledgerCsv(record));
    expect(header).toBe('of,fate,light,where,by,fraction,standard_error');
    expect(rows).toHaveLength(record.ledger.photons.length + record.ledger.watts.length);
    for (const of of ['photons', 'watts']) {
      const fractions = rows.filter((row) => row.startsWith(`${of},`)).map((row) => Number(row.split(',')[5]));
      expect(fractions.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 12);
    }
  });
});
