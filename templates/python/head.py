#
{{#each lines}}
# {{line}}
{{/each}}
#
