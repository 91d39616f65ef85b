/**
 * The whole data model. Keys of rows are the columns' names, which are those of the files and the API
 * (snake_case, unit in the name); `session` alone follows Lucia's adapter.
 */
export * from './accounts';
export * from './projects';
export * from './geometry';
export * from './blocks';
export * from './rotations';
export * from './features';
export * from './evidence';
export * from './sources';
export * from './history';
export * from './versions';
export * from './jobs';
