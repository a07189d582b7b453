/**
 * Which shop this tab shows. The tab's own memory comes first, so that two tabs can show two shops; a new
 * tab begins with the shop that was used last anywhere.
 */
const KEY = 'quarterload.shop'

function read(storage: () => Storage): string | undefined {
  try {
    return storage().getItem(KEY) ?? undefined
  } catch {
    // Storage can be switched off; then every tab begins with the first shop.
    return undefined
  }
}

function write(storage: () => Storage, shopId: string): void {
  try {
    storage().setItem(KEY, shopId)
  } catch {
    return
  }
}

export const rememberedShop = (): string | undefined => read(() => sessionStorage) ?? read(() => localStorage)

export function rememberShop(shopId: string): void {
  write(() => sessionStorage, shopId)
  write(() => localStorage, shopId)
}

/** The shop to show: the address names it, else this tab remembers it, else the first one. */
export function chooseShop<S extends { id: string }>(
  shops: readonly S[],
  asked: string | null | undefined,
  remembered: string | undefined,
): S | undefined {
  return shops.find((shop) => shop.id === asked) ?? shops.find((shop) => shop.id === remembered) ?? shops[0]
}
