import { DataTypes } from 'sequelize'

// Made anew for each column: Sequelize writes the column's name into the object it is given.

/** A UUID as text, compared byte by byte. */
export const idColumn = () => ({ type: DataTypes.CHAR(36), allowNull: false }) as const
export const optionalIdColumn = () => ({ type: DataTypes.CHAR(36), allowNull: true }) as const
export const optionalHashColumn = () => ({ type: DataTypes.CHAR(64), allowNull: true }) as const
export const hashColumn = () => ({ type: DataTypes.CHAR(64), allowNull: false }) as const
/** Milliseconds are kept, in UTC. */
export const timeColumn = () => ({ type: DataTypes.DATE(3), allowNull: false }) as const
export const optionalTimeColumn = () => ({ type: DataTypes.DATE(3), allowNull: true }) as const
export const dayColumn = () => ({ type: DataTypes.DATEONLY, allowNull: false }) as const
export const optionalDayColumn = () => ({ type: DataTypes.DATEONLY, allowNull: true }) as const
export const optionalCountColumn = () => ({ type: DataTypes.INTEGER, allowNull: true }) as const
export const countColumn = () => ({ type: DataTypes.INTEGER, allowNull: false }) as const
export const numberColumn = () => ({ type: DataTypes.DOUBLE, allowNull: false }) as const
export const optionalNumberColumn = () => ({ type: DataTypes.DOUBLE, allowNull: true }) as const
export const textColumn = () => ({ type: DataTypes.STRING, allowNull: false }) as const
export const optionalTextColumn = () => ({ type: DataTypes.STRING, allowNull: true }) as const
export const jsonColumn = () => ({ type: DataTypes.JSON, allowNull: false }) as const
