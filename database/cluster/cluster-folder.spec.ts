import { chmodSync, chownSync, existsSync, mkdirSync, mkdtempSync, rmSync, statSync, symlinkSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { claim, projectClusterFolder } from './cluster-folder';
import { clusterOwner, type ClusterOwner } from './owner';

const isRoot = process.getuid?.() === 0;

describe('the folder of a project’s cluster', () => {
  let top: string;
  let owner: ClusterOwner;
  const data = () => join(top, 'project', '.fettle');
  const outsider = () => {
    const folder = mkdtempSync(join(top, 'outsider-'));
    chownSync(folder, 12_345, 12_345);
    return folder;
  };
  const choose = () => projectClusterFolder(data(), owner, join(top, 'outside')).path;
  beforeEach(() => {
    owner = clusterOwner();
    top = mkdtempSync(join(tmpdir(), 'fettle-folder-'));
    chmodSync(top, 0o755);
    mkdirSync(join(top, 'outside'));
    mkdirSync(join(top, 'project'));
  });
  afterEach(() => {
    chmodSync(join(top, 'project'), 0o755);
    rmSync(top, { recursive: true });
  });

  it('is inside the project, its owner’s alone', () => {
    const path = choose();
    expect(path).toBe(join(data(), 'cluster'));
    expect(statSync(path).mode & 0o777).toBe(0o700);
    expect(statSync(path).uid).toBe(owner.kind === 'postgres' ? owner.uid : process.getuid?.());
  });

  it('moves outside when the owner may not pass the project’s parents, always to the same place', () => {
    // Only root hands the cluster to another user, so only root can meet this; anybody else reaches the own folder.
    if (isRoot) chmodSync(join(top, 'project'), 0o700);
    const path = choose();
    expect(path.startsWith(join(top, isRoot ? 'outside' : 'project'))).toBe(true);
    expect(choose()).toBe(path);
  });

  it('stays outside once a cluster is there, though the way in has opened', () => {
    if (isRoot) chmodSync(join(top, 'project'), 0o700);
    const path = choose();
    mkdirSync(join(path, 'data'));
    if (owner.kind === 'postgres') chownSync(join(path, 'data'), owner.uid, owner.gid);
    chmodSync(join(top, 'project'), 0o755);
    expect(choose()).toBe(path);
  });

  it('is not taken from another user', () => {
    const folder = join(data(), 'cluster', 'data');
    mkdirSync(join(data(), 'cluster'), { recursive: true });
    // Only root can give files away; anybody else points at root's.
    symlinkSync(isRoot ? outsider() : '/', folder);
    expect(choose).toThrow('belongs to the user');
  });

  it('refuses a link that somebody has laid in its place', () => {
    symlinkSync(top, join(top, 'outside', 'trap'));
    expect(() => claim(join(top, 'outside', 'trap'), owner)).toThrow('belongs to somebody else');
    expect(existsSync(join(top, 'data'))).toBe(false);
  });
});
