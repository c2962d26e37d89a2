import { Button, Link, Menu, Portal, Text } from '@chakra-ui/react';
import type { Study } from '@overtally/contracts';
import { Link as RouterLink } from 'react-router-dom';
import { formatDateTime } from '../../../lib/format-date.js';

interface VersionListProps {
  study: Study;
  /** Address of a version; of the newest one without a number. */
  versionTo: (version?: number) => string;
}

/** All versions of a study, the newest first, each with its comment. */
export function VersionList({ study, versionTo }: VersionListProps) {
  const newest = study.versions[0]?.version ?? study.version;
  const count = study.versions.length;
  return (
    <Menu.Root positioning={{ placement: 'bottom-end' }}>
      <Menu.Trigger asChild>
        <Button>{count === 1 ? '1 version' : `${count} versions`}</Button>
      </Menu.Trigger>
      <Portal>
        <Menu.Positioner>
          <Menu.Content maxH="60vh" overflowY="auto" maxW="sm">
            {study.versions.map(({ version, comment, author, createdAt }) => (
              <Menu.Item key={version} value={String(version)} asChild>
                <Link asChild color="ink" display="block" textDecoration="none">
                  <RouterLink to={versionTo(version === newest ? undefined : version)}>
                    <Text fontWeight={version === study.version ? '600' : '400'}>
                      {`Version ${version}${version === study.version ? ', shown' : ''}`}
                    </Text>
                    <Text fontSize="xs" color="inkSoft">
                      {`${formatDateTime(createdAt)}, ${author.name}${comment ? `: ${comment}` : ''}`}
                    </Text>
                  </RouterLink>
                </Link>
              </Menu.Item>
            ))}
          </Menu.Content>
        </Menu.Positioner>
      </Portal>
    </Menu.Root>
  );
}
