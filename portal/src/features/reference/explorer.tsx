import 'swagger-ui-react/swagger-ui.css'
import './explorer.css'
import SwaggerUI from 'swagger-ui-react'
import { keyPlugin } from './key-plugin.tsx'

const plugins = [keyPlugin]

export default function Explorer() {
  return (
    <div className="explorer">
      <SwaggerUI
        url="/v1/openapi.json"
        plugins={plugins}
        docExpansion="list"
        defaultModelsExpandDepth={-1}
        persistAuthorization={false}
      />
    </div>
  )
}
