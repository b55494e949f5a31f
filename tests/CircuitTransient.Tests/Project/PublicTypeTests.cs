using System.Reflection;
using System.Xml.Linq;
using CircuitTransient.Cli;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Project;

/// <summary>Every public type says what it is.</summary>
public class PublicTypeTests
{
    public static TheoryData<Assembly> Assemblies =>
        [typeof(SourceText).Assembly, typeof(App).Assembly];

    [Theory]
    [MemberData(nameof(Assemblies))]
    public void Every_public_type_has_a_summary(Assembly assembly)
    {
        var documented = XDocument.Load(Path.ChangeExtension(assembly.Location, ".xml"))
            .Descendants("member")
            .Where(member => !string.IsNullOrWhiteSpace((string?)member.Element("summary")))
            .Select(member => (string?)member.Attribute("name"))
            .ToHashSet();
        var types = assembly.GetExportedTypes();

        Assert.NotEmpty(types);
        Assert.Empty(types.Select(DocumentationName).Where(name => !documented.Contains(name)).ToList());
    }

    /// <summary>A record writes all its properties: one that makes another of its own kind would be written
    /// without end.</summary>
    [Theory]
    [MemberData(nameof(Assemblies))]
    public void No_record_is_written_without_end(Assembly assembly)
    {
        const BindingFlags own = BindingFlags.Instance | BindingFlags.Public | BindingFlags.NonPublic
            | BindingFlags.DeclaredOnly;
        var endless = assembly.GetTypes()
            .Where(type => type.GetMethod("PrintMembers", own) is not null
                && type.GetMethod("ToString", own, [])?
                    .IsDefined(typeof(System.Runtime.CompilerServices.CompilerGeneratedAttribute)) == true)
            .SelectMany(type => type.GetProperties(BindingFlags.Instance | BindingFlags.Public))
            .Where(property => property.PropertyType == property.DeclaringType
                && property.DeclaringType!.GetField($"<{property.Name}>k__BackingField", own) is null);

        Assert.Empty(endless.Select(property => $"{property.DeclaringType}.{property.Name}"));
    }

    private static string DocumentationName(Type type) => $"T:{type.FullName!.Replace('+', '.')}";
}
