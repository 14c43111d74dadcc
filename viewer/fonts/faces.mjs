/** The faces of the workbench: where each comes from and what it is called inside its file. */
export const FACES = [
  {
    file: 'sans-400',
    package: 'source-sans-3',
    source: '400Regular/SourceSans3_400Regular',
    family: 'Branchlight Sans',
    style: 'Regular',
  },
  {
    file: 'sans-600',
    package: 'source-sans-3',
    source: '600SemiBold/SourceSans3_600SemiBold',
    family: 'Branchlight Sans',
    style: 'SemiBold',
  },
  {
    file: 'serif-400',
    package: 'source-serif-4',
    source: '400Regular/SourceSerif4_400Regular',
    family: 'Branchlight Serif',
    style: 'Regular',
  },
  {
    file: 'serif-400-italic',
    package: 'source-serif-4',
    source: '400Regular_Italic/SourceSerif4_400Regular_Italic',
    family: 'Branchlight Serif',
    style: 'Italic',
  },
  {
    file: 'serif-600',
    package: 'source-serif-4',
    source: '600SemiBold/SourceSerif4_600SemiBold',
    family: 'Branchlight Serif',
    style: 'SemiBold',
  },
  {
    file: 'serif-600-italic',
    package: 'source-serif-4',
    source: '600SemiBold_Italic/SourceSerif4_600SemiBold_Italic',
    family: 'Branchlight Serif',
    style: 'SemiBold Italic',
  },
];
