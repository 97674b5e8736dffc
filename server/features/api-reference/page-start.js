window.SwaggerUIBundle({ url: '/api/openapi.json', dom_id: '#reference', docExpansion: 'list', deepLinking: true });
