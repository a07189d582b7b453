import type { ProtocolList, ProtocolResponse, ProtocolRow } from '#shared/api/protocols'
import type { ProtocolInShop, ProtocolWithVersions } from '../services/protocols'

function presentProtocol({ id, name, version, content, archived }: ProtocolInShop): ProtocolRow {
  return { id, name, version, content, archived }
}

export function presentProtocolList(protocols: readonly ProtocolInShop[]): ProtocolList {
  return { protocols: protocols.map(presentProtocol) }
}

export function presentProtocolWithVersions({ shopId, protocol, versions }: ProtocolWithVersions): ProtocolResponse {
  return {
    shopId,
    protocol: presentProtocol(protocol),
    versions: versions.map(({ version, content, createdAt, createdBy }) => ({
      version,
      content,
      createdAt: createdAt.toISOString(),
      createdBy,
    })),
  }
}
