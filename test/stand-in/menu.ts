interface Template {
  readonly id?: string
  readonly label?: string
  readonly type?: string
  readonly role?: string
  readonly accelerator?: string
  readonly click?: (item: MenuItem, window: unknown, event: object) => void
  readonly submenu?: readonly Template[]
}
/** What a role does, for the two that end something; the others act on native parts. */
export type Roles = Readonly<Record<string, () => void>>

export class MenuItem {
  readonly id: string
  readonly label: string
  readonly type: string
  readonly role: string | undefined
  readonly accelerator: string | undefined
  readonly submenu: Menu | undefined
  readonly click: () => void

  constructor(template: Template, roles: Roles) {
    this.id = template.id ?? ''
    this.label = template.label ?? ''
    this.type = template.type ?? (template.submenu ? 'submenu' : 'normal')
    this.role = template.role
    this.accelerator = template.accelerator
    this.submenu = template.submenu ? new Menu(template.submenu, roles) : undefined
    this.click = () => {
      if (template.role) roles[template.role]?.()
      template.click?.(this, null, {})
    }
  }
}

export class Menu {
  readonly items: readonly MenuItem[]

  constructor(template: readonly Template[], roles: Roles) {
    this.items = template.map((part) => new MenuItem(part, roles))
  }

  getMenuItemById(id: string): MenuItem | null {
    for (const item of this.items) {
      const found = item.id === id ? item : (item.submenu?.getMenuItemById(id) ?? null)
      if (found) return found
    }
    return null
  }
}
