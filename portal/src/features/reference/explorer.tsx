import 'swagger-ui-react/swagger-ui.css'
import './explorer.css'
import SwaggerUI from 'swagger-ui-react'

export default function Explorer() {
  return (
    <div className="explorer">
      <SwaggerUI
        url="/v1/openapi.json"
        docExpansion="list"
        defaultModelsExpandDepth={-1}
        persistAuthorization={false}
      />
    </div>
  )
}
